import type { Knex } from 'knex';

/** A run's sums over its points come from this index alone, without reading the points themselves. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw('CREATE INDEX points_progress ON points (run_id, done, frames, frame_errors)');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP INDEX points_progress');
}

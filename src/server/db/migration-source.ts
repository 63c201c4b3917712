import type { Knex } from 'knex';

interface Migration {
  up(knex: Knex): Promise<void>;
  down(knex: Knex): Promise<void>;
}

// Bundled by Vite, so that the built server carries its migrations.
const modules = import.meta.glob<Migration>('../../../db/migrations/*.ts', { eager: true });

export const migrationSource: Knex.MigrationSource<string> = {
  async getMigrations() {
    return Object.keys(modules).sort();
  },
  // Equal to the file name that the command line records, or each would call the other's database corrupt.
  getMigrationName: (path) => path.slice(path.lastIndexOf('/') + 1),
  async getMigration(path) {
    const migration = modules[path];
    if (!migration) throw new Error(`There is no migration ${path}.`);
    return migration;
  },
};

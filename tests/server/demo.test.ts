import { statSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runShard } from '@/core/simulation/shard.ts';
import { impossibleTally } from '@/core/simulation/tally.ts';
import { migrateSafely } from '@/server/db/migrate.ts';
import { migrationSource } from '@/server/db/migration-source.ts';
import { buildDemoCode } from '../../db/seeds/demo/build.ts';
import { kernelFor } from '../../db/seeds/demo/kernel.ts';
import results from '../../db/seeds/demo/runs.json' with { type: 'json' };
import { type DemoRun, demoProjects } from '../../db/seeds/demo/scenario.ts';
import { type PackedTally, type StoredResults, unpackTally } from '../../db/seeds/demo/stored-results.ts';
import { seedDemo } from '../../db/seeds/demo.ts';
import { openScratch, type Scratch } from './scratch-database.ts';

const stored = results as unknown as StoredResults;
const codes = new Map(demoProjects.flatMap((project) => project.codes).map((code) => [code.key, code]));
const runs = demoProjects.flatMap((project) => project.runs);
const builtCodes = new Map<string, ReturnType<typeof buildDemoCode>>();
const built = (key: string) => {
  if (!builtCodes.has(key)) builtCodes.set(key, buildDemoCode(codes.get(key)!));
  return builtCodes.get(key)!;
};

/** A few shards of a run, spread over its points; one where decoding is slow. */
function sampleOf(run: DemoRun): [position: number, index: number][] {
  const points = stored.runs[run.key]!;
  const middle = points.length >> 1;
  const last = points[middle]!.length - 1;
  if (run.points[middle]!.decoder.kind === 'sum-product') return [[middle, last]];
  return [
    [0, 0],
    [middle, last],
    [points.length - 1, 0],
  ];
}

describe('the stored results', () => {
  it('are small enough to ship', () => {
    expect(statSync(new URL('../../db/seeds/demo/runs.json', import.meta.url)).size).toBeLessThan(200_000);
  });

  it('are of the matrices that the engine builds today', async () => {
    expect(Object.keys(stored.fingerprints).sort()).toEqual([...codes.keys()].sort());
    for (const key of codes.keys()) expect((await built(key)).fingerprint).toBe(stored.fingerprints[key]);
  });

  it('cover every point of the scenario up to its stopping rule, with possible tallies', async () => {
    for (const run of runs) {
      const points = stored.runs[run.key]!;
      expect(points).toHaveLength(run.points.length);
      for (const [position, shards] of points.entries()) {
        const { n } = await built(run.points[position]!.code);
        const errors = shards.reduce((sum, [frameErrors]) => sum + frameErrors, 0);
        const enough = errors >= run.stopping.frameErrors!;
        expect(enough || shards.length * run.framesPerShard >= run.stopping.maxFrames).toBe(true);
        for (const packed of shards) {
          expect(impossibleTally(unpackTally(packed, run.framesPerShard, n), n, run.framesPerShard)).toBeNull();
        }
      }
    }
  });

  it.each(runs.map((run) => [run.key, run] as const))(
    'of %s come out of the engine again to the last integer',
    async (...[, run]) => {
      for (const [position, index] of sampleOf(run)) {
        const { code, channel, decoder } = run.points[position]!;
        const { H, n } = await built(code);
        const { seed, framesPerShard } = run;
        const again = await runShard({ H, channel, decoder, seed, framesPerShard }, index, kernelFor(decoder));
        const packed: PackedTally = stored.runs[run.key]![position]![index]!;
        expect(again).toEqual(unpackTally(packed, framesPerShard, n));
      }
    },
  );
});

describe('seeding', () => {
  let scratch: Scratch;
  beforeAll(async () => {
    scratch = openScratch();
    await migrateSafely(scratch.db, migrationSource);
  });
  afterAll(() => scratch.db.destroy());

  it('fills an empty database with two projects, their members and finished runs', async () => {
    expect(await seedDemo(scratch.db)).toBe(true);
    expect(await scratch.db('projects').orderBy('name').pluck('name')).toEqual(['Buoy uplink', 'Shore archive']);
    expect(await scratch.db('users').orderBy('email').pluck('email')).toEqual(
      ['engineer', 'owner', 'reviewer', 'viewer'].map((role) => `${role}@demo.test`),
    );
    expect(await scratch.db('memberships')).toHaveLength(8);
    expect(await scratch.db('points').where({ done: 0 })).toEqual([]);
    const sums = await scratch.db('points').sum({ frames: 'frames', errors: 'frame_errors' }).first();
    expect(await scratch.db('shards').sum({ frames: 'frames', errors: 'frame_errors' }).first()).toEqual(sums);
  });

  it('touches nothing the second time', async () => {
    expect(await seedDemo(scratch.db)).toBe(false);
    expect(await scratch.db('projects')).toHaveLength(2);
  });
});

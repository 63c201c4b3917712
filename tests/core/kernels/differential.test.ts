import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fastShard } from '../../../src/core/kernels/index.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { cap, regularColumns, runs } from './arbitrary-runs.ts';
import { exactDecoders } from './decoder-arbitraries.ts';

describe('a kernel gives the reference tally to the last integer, on any matrix, for', () => {
  for (const [name, decoders] of Object.entries(exactDecoders)) {
    test(name, async () => {
      await fc.assert(
        fc.asyncProperty(runs(decoders), async ({ spec, index }) => {
          expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
        }),
        { numRuns: 40 },
      );
    });
  }

  test('the finite alphabet, with its own table and any symmetric one', async () => {
    const level = fc.integer({ min: -3, max: 3 });
    const table = fc
      .array(fc.array(level, { minLength: 7, maxLength: 7 }), { minLength: 7, maxLength: 7 })
      .map((rows) => rows.map((row, a) => row.map((value, b) => (a < b ? value : rows[b]![a]!))));
    const decoders = () =>
      fc.record({
        kind: fc.constant('finite-alphabet' as const),
        iterations: cap,
        table: fc.option(table, { nil: undefined, freq: 2 }),
      });
    await fc.assert(
      fc.asyncProperty(runs(decoders, { from: regularColumns(3) }), async ({ spec, index }) => {
        expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
      }),
      { numRuns: 40 },
    );
  });

  test('peeling of erasures', async () => {
    await fc.assert(
      fc.asyncProperty(
        runs(() => fc.constant({ kind: 'peeling' }), { erasures: true }),
        async ({ spec, index }) => {
          expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
        },
      ),
      { numRuns: 40 },
    );
  });
});

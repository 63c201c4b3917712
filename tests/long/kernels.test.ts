import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fastShard } from '../../src/core/kernels/index.ts';
import { laneShard } from '../../src/core/simulation/lane-shard.ts';
import { drive, runShard } from '../../src/core/simulation/shard.ts';
import { cap, regularColumns, runs } from '../core/kernels/arbitrary-runs.ts';
import { exactDecoders } from '../core/kernels/decoder-arbitraries.ts';

// The comparison of tests/core/kernels, thousands of times over.
const numRuns = 3000;

describe('over thousands of random matrices, weights, seeds and caps a kernel gives the reference tally for', () => {
  for (const [name, decoders] of Object.entries(exactDecoders)) {
    test(name, async () => {
      await fc.assert(
        fc.asyncProperty(runs(decoders, { maxFrames: 700 }), async ({ spec, index }) => {
          const reference = await runShard(spec, index, 'reference');
          expect(await fastShard(spec, index)).toEqual(reference);
          const lanes = laneShard(spec, index);
          if (lanes) expect(await drive(lanes, {})).toEqual(reference);
        }),
        { numRuns },
      );
    });
  }

  test('the finite alphabet', async () => {
    const decoders = () => fc.record({ kind: fc.constant('finite-alphabet' as const), iterations: cap });
    await fc.assert(
      fc.asyncProperty(runs(decoders, { from: regularColumns(3), maxFrames: 700 }), async ({ spec, index }) => {
        expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
      }),
      { numRuns },
    );
  });

  test('peeling', async () => {
    await fc.assert(
      fc.asyncProperty(
        runs(() => fc.constant({ kind: 'peeling' }), { erasures: true }),
        async ({ spec, index }) => {
          expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
        },
      ),
      { numRuns },
    );
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { slicedShard } from '../../../src/core/kernels/index.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { runs } from './arbitrary-runs.ts';
import { exactDecoders } from './decoder-arbitraries.ts';

describe('without SIMD, words of 32 frames give the reference tally to the last integer for', () => {
  for (const name of ['majority-logic', 'bit-flipping', 'gallager-a', 'gallager-b']) {
    test(name, async () => {
      await fc.assert(
        fc.asyncProperty(runs(exactDecoders[name]!), async ({ spec, index }) => {
          const { decoder } = spec;
          const changing =
            decoder.kind === 'gallager-b' && Array.isArray(decoder.threshold) && decoder.threshold.length > 1;
          const sliced = await slicedShard(spec, index);
          // Thresholds that change by iteration are left to the reference.
          if (changing) expect(sliced).toBeNull();
          else expect(sliced).toEqual(await runShard(spec, index, 'reference'));
        }),
        { numRuns: 40 },
      );
    });
  }
});

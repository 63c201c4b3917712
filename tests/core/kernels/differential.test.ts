import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fastShard } from '../../../src/core/kernels/index.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { runs } from './arbitrary-runs.ts';
import { exactDecoders } from './decoder-arbitraries.ts';

describe('a kernel gives the reference tally to the last integer, on any matrix, for', () => {
  for (const [name, decoders] of Object.entries(exactDecoders)) {
    test(name, async () => {
      await fc.assert(
        fc.asyncProperty(runs(decoders), async ({ spec, index }) => {
          expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
        }),
        { numRuns: 60 },
      );
    });
  }

  test('peeling of erasures', async () => {
    await fc.assert(
      fc.asyncProperty(
        runs(() => fc.constant({ kind: 'peeling' }), { erasures: true }),
        async ({ spec, index }) => {
          expect(await fastShard(spec, index)).toEqual(await runShard(spec, index, 'reference'));
        },
      ),
      { numRuns: 60 },
    );
  });
});

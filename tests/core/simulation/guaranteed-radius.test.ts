import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { tannerGraph } from '../../../src/core/decoders/tanner-graph.ts';
import { guaranteedRadius, mostSharedChecks } from '../../../src/core/simulation/guaranteed-radius.ts';
import { countEveryPattern } from '../../models/pattern-enumeration.ts';
import { smallMatrix } from '../../models/random-matrix.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';
import { simulatedCodes } from '../../reference/simulated-codes.ts';

const plane4 = developed(21, planarDifferenceSets[4].set);
const withRadius: DecoderSpec[] = [
  { kind: 'majority-logic' },
  { kind: 'gallager-a' },
  { kind: 'gallager-b' },
  { kind: 'bit-flipping' },
  { kind: 'bit-flipping-max' },
  { kind: 'gradient-descent' },
  { kind: 'peeling' },
  { kind: 'elimination' },
  { kind: 'two-stage', stages: [{ kind: 'bit-flipping' }, { kind: 'min-sum' }] },
];

describe('a guaranteed radius', () => {
  it.each<[DecoderSpec, number]>([
    [{ kind: 'majority-logic' }, 2],
    [{ kind: 'gallager-b' }, 2],
    [{ kind: 'bit-flipping' }, 2],
    [{ kind: 'bit-flipping', threshold: 5 }, 1],
    [{ kind: 'bit-flipping-max' }, 2],
    [{ kind: 'bit-flipping-max', iterations: 1 }, 1],
    [{ kind: 'gradient-descent' }, 2],
    [{ kind: 'peeling' }, 5],
  ])('of %j on PG(2,4) is %i', (decoder, radius) => {
    expect(guaranteedRadius(plane4, decoder)).toMatchObject({ value: radius, grade: 'proved' });
  });

  it('of one-step majority logic on PG(2,16) is 8 errors, half the column weight', () => {
    expect(guaranteedRadius(simulatedCodes.pg16!(), { kind: 'majority-logic' })!.value).toBe(8);
  });

  it('holds for every pattern up to it, whatever the matrix (each pattern decoded)', () => {
    fc.assert(
      fc.property(smallMatrix, fc.constantFrom(...withRadius), (H, decoder) => {
        const { value } = guaranteedRadius(H, decoder)!;
        for (let w = 0; w <= Math.min(value, H.cols); w++)
          expect(countEveryPattern({ H, decoder }, w).frameErrors).toBe(0);
      }),
      { numRuns: 300 },
    );
  });

  it('holds on planes for every decoder that has one', () => {
    for (const decoder of withRadius) {
      const { value } = guaranteedRadius(plane4, decoder)!;
      for (let w = 1; w <= Math.min(value, 3); w++)
        expect(countEveryPattern({ H: plane4, decoder }, w).frameErrors).toBe(0);
    }
  });

  it('is not known for min-sum and sum-product', () => {
    expect(guaranteedRadius(plane4, { kind: 'min-sum' })).toBeNull();
    expect(guaranteedRadius(plane4, { kind: 'sum-product' })).toBeNull();
  });

  it('rests on how many checks two bits share: one on a plane', () => {
    expect(mostSharedChecks(tannerGraph(plane4))).toBe(1);
  });
});

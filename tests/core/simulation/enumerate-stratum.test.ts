import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matrixFromRows } from '../../../src/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { LimitError, ParamError } from '../../../src/core/errors.ts';
import { symmetryOf } from '../../../src/core/simulation/code-symmetry.ts';
import { computedStratum, enumerateStratum } from '../../../src/core/simulation/enumerate-stratum.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { mergeTallies } from '../../../src/core/simulation/tally.ts';
import { countEveryPattern } from '../../models/pattern-enumeration.ts';
import { quasiCyclicMatrix, smallMatrix } from '../../models/random-matrix.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';

const plane4 = developed(21, planarDifferenceSets[4].set);
const spec = (H: RunSpec['H'], decoder: DecoderSpec): RunSpec => ({
  H,
  channel: { kind: 'bsc', p: 0.1 },
  decoder,
  seed: '',
  framesPerShard: 1,
});

const decoders: DecoderSpec[] = [
  { kind: 'majority-logic' },
  { kind: 'gallager-b', iterations: 3 },
  { kind: 'bit-flipping', iterations: 3 },
  { kind: 'bit-flipping-max', iterations: 3 },
  { kind: 'gradient-descent', iterations: 4 },
  { kind: 'gradient-descent', iterations: 4, flips: 'single' },
  { kind: 'min-sum', iterations: 3, schedule: 'layered' },
  { kind: 'min-sum', iterations: 3, schedule: 'flooding' },
  { kind: 'peeling' },
  { kind: 'elimination' },
];

describe('an enumerated stratum', () => {
  it('counts as if every pattern had been decoded, with whatever symmetry a matrix has', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(smallMatrix, quasiCyclicMatrix),
        fc.constantFrom(...decoders),
        fc.nat(5),
        async (H, decoder, weight) => {
          const w = Math.min(weight, H.cols);
          const counted = await enumerateStratum(spec(H, decoder), w);
          expect(counted).toMatchObject(countEveryPattern({ H, decoder }, w));
          expect(counted.patterns).toBe(BigInt(counted.frames));
        },
      ),
      { numRuns: 150 },
    );
  });

  it('of PG(2,4) decodes one pattern in about a hundred', async () => {
    const counted = await enumerateStratum(spec(plane4, { kind: 'gallager-b' }), 5);
    expect(counted.patterns).toBe(20349n);
    expect(counted.symmetryOrder).toBe(126);
    expect(counted.representatives).toBeLessThan(20349 / 100);
    expect(counted.complete).toBe(true);
  });

  it('adds up from parts', async () => {
    const whole = await enumerateStratum(spec(plane4, { kind: 'bit-flipping' }), 4, { symmetry: [] });
    const middle = Math.floor(whole.branches / 3);
    const parts = await Promise.all([
      enumerateStratum(spec(plane4, { kind: 'bit-flipping' }), 4, { symmetry: [], to: middle }),
      enumerateStratum(spec(plane4, { kind: 'bit-flipping' }), 4, { symmetry: [], from: middle }),
    ]);
    expect(parts.map(({ complete }) => complete)).toEqual([false, false]);
    expect(() => computedStratum(4, parts[0]!)).toThrow(ParamError);
    expect(computedStratum(4, whole)).toMatchObject({ weight: 4, frames: 5985, grade: 'computed' });
    expect(whole).toMatchObject(mergeTallies(parts[0]!, parts[1]!));
    expect(parts[0]!.patterns + parts[1]!.patterns).toBe(5985n);
  });

  it('is refused past the limit, saying how many patterns it would take', async () => {
    await expect(enumerateStratum(spec(plane4, { kind: 'gallager-b' }), 8, { limitPatterns: 100 })).rejects.toThrow(
      LimitError,
    );
  });

  it('refuses a permutation that is no symmetry', async () => {
    const swap = Uint32Array.from({ length: 21 }, (_, j) => (j < 2 ? 1 - j : j));
    await expect(
      enumerateStratum(spec(plane4, { kind: 'gallager-b' }), 2, { symmetry: [{ pointPerm: swap }] }),
    ).rejects.toThrow(ParamError);
  });

  it('refuses a decoder that must know p, and a channel whose errors are not alike everywhere', async () => {
    await expect(enumerateStratum(spec(plane4, { kind: 'sum-product' }), 2)).rejects.toThrow(ParamError);
    const bursty = { kind: 'gilbert-elliott', pGood: 0.01, pBad: 0.2, goodToBad: 0.1, badToGood: 0.2 } as const;
    await expect(enumerateStratum({ ...spec(plane4, { kind: 'gallager-b' }), channel: bursty }, 2)).rejects.toThrow(
      ParamError,
    );
    await expect(enumerateStratum(spec(plane4, { kind: 'gallager-b' }), 22)).rejects.toThrow(ParamError);
  });
});

describe('symmetry found in a matrix', () => {
  it('of a cyclic plane is the shift and its multipliers 2 and 11', () => {
    expect(symmetryOf(plane4).map((permutation) => permutation[1])).toEqual([2, 2, 11]);
  });

  it('of an array of circulants is the shift within blocks', () => {
    const H = matrixFromRows(6, [
      [0, 4],
      [1, 5],
      [2, 3],
    ]);
    expect(symmetryOf(H).map((shift) => Array.from(shift))).toEqual([[1, 2, 0, 4, 5, 3]]);
  });

  it('of a lopsided matrix is none', () => {
    expect(
      symmetryOf(
        matrixFromRows(4, [
          [0, 1, 2],
          [2, 3],
        ]),
      ),
    ).toEqual([]);
  });
});

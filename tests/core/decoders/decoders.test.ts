import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matrixFromRows, type SparseMatrix, syndrome } from '../../../src/core/codes/sparse-matrix.ts';
import { createDecoder } from '../../../src/core/decoders/create-decoder.ts';
import { erased } from '../../../src/core/decoders/decoder.ts';
import { finiteAlphabet, oppositeTable, rememberedTable } from '../../../src/core/decoders/finite-alphabet.ts';
import { minSumSettings, scaledMagnitude } from '../../../src/core/decoders/settings.ts';
import { columnDegrees, tannerGraph } from '../../../src/core/decoders/tanner-graph.ts';
import { ParamError } from '../../../src/core/errors.ts';
import { smallMatrix } from '../../models/random-matrix.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';
import { simulatedCodes } from '../../reference/simulated-codes.ts';

const plane4 = developed(21, planarDifferenceSets[4].set);
const bec = { kind: 'bec', e: 0.3 } as const;
const bsc = { kind: 'bsc', p: 0.05 } as const;

/** All codewords of a small code, by trying every word. */
function codewords(H: SparseMatrix): Uint8Array[] {
  return Array.from({ length: 2 ** H.cols }, (_, bits) =>
    Uint8Array.from({ length: H.cols }, (_, j) => (bits >> j) & 1),
  ).filter((word) => !syndrome(H, word).includes(1));
}

describe('elimination', () => {
  it('finds a bit exactly when all codewords that agree with what was received have it alike', () => {
    fc.assert(
      fc.property(smallMatrix, fc.nat(1023), fc.nat(), (H, mask, pick) => {
        const words = codewords(H);
        const sent = words[pick % words.length]!;
        const received = sent.map((bit, j) => ((mask >> j) & 1 ? erased : bit));
        const agreeing = words.filter((word) => word.every((bit, j) => received[j] === erased || received[j] === bit));
        const expected = received.map((_, j) =>
          agreeing.every((word) => word[j] === agreeing[0]![j]) ? agreeing[0]![j]! : erased,
        );
        expect(Array.from(createDecoder(H, { kind: 'elimination' }, bec).decode(received).word)).toEqual(
          Array.from(expected),
        );
      }),
      { numRuns: 150 },
    );
  });
});

describe('peeling', () => {
  it('leaves the largest set of erased bits that meets no check once (tried over all subsets)', () => {
    fc.assert(
      fc.property(smallMatrix, fc.nat(1023), (H, bits) => {
        const mask = bits & (2 ** H.cols - 1);
        const rows = Array.from({ length: H.rows }, (_, i) =>
          H.colIndex.subarray(H.rowStart[i], H.rowStart[i + 1]).reduce((sum, c) => sum | (1 << c), 0),
        );
        let stopping = 0;
        for (let subset = 0; subset < 2 ** H.cols; subset++) {
          const once = rows.some((row) => [1, 2, 4, 8, 16, 32, 64, 128, 256, 512].includes(row & subset));
          if ((subset & ~mask) === 0 && !once) stopping |= subset;
        }
        const received = Uint8Array.from({ length: H.cols }, (_, j) => ((mask >> j) & 1 ? erased : 0));
        const { word } = createDecoder(H, { kind: 'peeling' }, bec).decode(received);
        expect(word.reduce((sum, bit, j) => sum | (bit === erased ? 1 << j : 0), 0)).toBe(stopping);
      }),
      { numRuns: 60 },
    );
  });

  it('never finds less than nothing and never more than elimination', () => {
    const peel = createDecoder(plane4, { kind: 'peeling' }, bec);
    const solve = createDecoder(plane4, { kind: 'elimination' }, bec);
    fc.assert(
      fc.property(fc.uniqueArray(fc.nat(20)), (positions) => {
        const received = new Uint8Array(21);
        for (const j of positions) received[j] = erased;
        const left = peel.decode(received).word.filter((bit) => bit === erased).length;
        expect(solve.decode(received).word.filter((bit) => bit === erased).length).toBeLessThanOrEqual(left);
      }),
    );
  });
});

describe('the finite-alphabet table', () => {
  it('from memory is symmetric in its messages and never falls as a message rises', () => {
    for (let a = 0; a < 7; a++)
      for (let b = 0; b < 7; b++) {
        expect(rememberedTable[a]![b]).toBe(rememberedTable[b]![a]);
        if (a > 0) expect(rememberedTable[a]![b]!).toBeGreaterThanOrEqual(rememberedTable[a - 1]![b]!);
      }
  });

  it('for received 0 never says less than the one for received 1', () => {
    const one = oppositeTable(rememberedTable);
    rememberedTable.forEach((row, a) => {
      row.forEach((value, b) => {
        expect(value).toBeGreaterThanOrEqual(one[a]![b]!);
      });
    });
  });

  it('may be given in the spec: here sums cut to three levels, which correct a single error', () => {
    const sums = Array.from({ length: 7 }, (_, a) =>
      Array.from({ length: 7 }, (_, b) => Math.max(-3, Math.min(3, 1 + (a - 3) + (b - 3)))),
    );
    const H = simulatedCodes.arr7_3!();
    const graph = tannerGraph(H);
    const decoder = finiteAlphabet(graph, columnDegrees(H), { kind: 'finite-alphabet', table: sums }, 5);
    const received = new Uint8Array(49);
    received[3] = 1;
    expect(decoder.decode(received)).toMatchObject({ converged: true });
    expect(decoder.decode(received).word).not.toContain(1);
  });

  it('is refused for another column weight, and when it is not symmetric in its messages', () => {
    expect(() => createDecoder(plane4, { kind: 'finite-alphabet' }, bsc)).toThrow(ParamError);
    const skew = rememberedTable.map((row) => row.slice());
    skew[0]![6] = 3;
    const fano = developed(7, planarDifferenceSets[2].set);
    expect(() => createDecoder(fano, { kind: 'finite-alphabet', table: skew }, bsc)).toThrow(ParamError);
  });

  it('beats Gallager B on the Tanner code', () => {
    const H = simulatedCodes.tanner155!();
    const failures = (kind: 'finite-alphabet' | 'gallager-b') => {
      const decoder = createDecoder(H, { kind }, bsc);
      let failed = 0;
      for (let start = 0; start < 155; start++) {
        const received = new Uint8Array(155);
        for (const step of [0, 17, 40, 66, 101, 139]) received[(start * 31 + step * (start + 1)) % 155] = 1;
        if (decoder.decode(received).word.includes(1)) failed += 1;
      }
      return failed;
    };
    expect(failures('finite-alphabet')).toBeLessThanOrEqual(failures('gallager-b'));
  });
});

describe('min-sum settings', () => {
  it('never let 8-bit sums saturate', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 140 }), fc.integer({ min: 1, max: 126 }), (weight, c) => {
        const degrees = Uint32Array.of(1, weight);
        try {
          const settings = minSumSettings(degrees, { kind: 'min-sum', c });
          expect(settings.c + weight * settings.rMax).toBeLessThanOrEqual(127);
          expect(settings.c + weight * (settings.rMax + 1)).toBeGreaterThan(127);
        } catch (error) {
          expect(error).toBeInstanceOf(ParamError);
          expect(c + weight).toBeGreaterThan(127);
        }
      }),
    );
  });

  it.each([
    ['1/8', [0, 0, 1, 2]],
    ['1/4', [0, 1, 2, 5]],
    ['1/2', [1, 3, 5, 10]],
    ['3/4', [2, 5, 8, 15]],
    ['1', [3, 7, 11, 20]],
    ['offset-1', [2, 6, 10, 20]],
  ] as const)('scale magnitudes 3, 7, 11 and 21 by %s, cut to 20', (scale, expected) => {
    expect([3, 7, 11, 21].map((m) => scaledMagnitude(m, { scale, rMax: 20 }))).toEqual(expected);
  });
});

describe('Gallager B', () => {
  it('takes a list of thresholds by iteration, the last standing for the rest', () => {
    const received = new Uint8Array(21);
    for (const j of [0, 2, 5]) received[j] = 1;
    const run = (threshold: number | number[]) => {
      const decoder = createDecoder(plane4, { kind: 'gallager-b', threshold, iterations: 4 }, bsc);
      return Array.from(decoder.decode(received).word);
    };
    expect(run([3, 3, 3])).toEqual(run(3));
    expect(run([4])).toEqual(run(4));
    const words = new Set([run([3, 4]), run([4, 3]), run(3), run(4)].map(String));
    expect(words.size).toBeGreaterThan(1);
  });
});

describe('majority logic', () => {
  it('keeps a bit at a tie', () => {
    const H = matrixFromRows(4, [
      [0, 1],
      [0, 2],
      [1, 2, 3],
    ]);
    // Bit 0 is in two checks; one of them fails.
    const received = Uint8Array.of(0, 1, 0, 1);
    expect(createDecoder(H, { kind: 'majority-logic' }, bsc).decode(received).word[0]).toBe(0);
  });
});

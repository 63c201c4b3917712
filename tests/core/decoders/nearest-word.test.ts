import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matrixFromRows, type SparseMatrix, syndrome } from '../../../src/core/codes/sparse-matrix.ts';
import { nearestWord } from '../../../src/core/decoders/nearest-word.ts';
import { ParamError } from '../../../src/core/errors.ts';
import { messageLength, runNearestWordShard } from '../../../src/core/simulation/nearest-word-shard.ts';
import facts from '../../reference/decoder-facts.json' with { type: 'json' };
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';

const lines = developed(7, planarDifferenceSets[2].set);
const plane4 = developed(21, planarDifferenceSets[4].set);

/** All words of a linear code as a list of words. */
function allWords(H: SparseMatrix): SparseMatrix {
  const words: number[][] = [];
  for (let bits = 0; bits < 2 ** H.cols; bits++) {
    const word = Uint8Array.from({ length: H.cols }, (_, j) => (bits >> j) & 1);
    if (!syndrome(H, word).includes(1)) words.push(Array.from(word).flatMap((bit, j) => (bit ? [j] : [])));
  }
  return matrixFromRows(H.cols, words);
}

describe('the nearest word', () => {
  it('is the first of those at least distance (compared bit by bit)', () => {
    fc.assert(
      fc.property(fc.nat(2 ** 21 - 1), (bits) => {
        const received = Uint8Array.from({ length: 21 }, (_, j) => (bits >> j) & 1);
        const distances = Array.from({ length: 21 }, (_, i) => {
          const word = new Uint8Array(21);
          for (const j of plane4.colIndex.subarray(plane4.rowStart[i], plane4.rowStart[i + 1])) word[j] = 1;
          return word.reduce((sum, bit, j) => sum + (bit ^ received[j]!), 0);
        });
        const distance = Math.min(...distances);
        expect(nearestWord(plane4).decode(received)).toEqual({ index: distances.indexOf(distance), distance });
      }),
    );
  });

  it('of the Hamming code is the word sent for every single error and no other: the perfect decoder', () => {
    const hamming = allWords(
      matrixFromRows(7, [
        [0, 2, 4, 6],
        [1, 2, 5, 6],
        [3, 4, 5, 6],
      ]),
    );
    const { F_w, B_w } = facts.entries['E-perfect-7-1'].value;
    const failed = new Array(8).fill(0);
    const wrong = new Array(8).fill(0);
    for (let bits = 0; bits < 128; bits++) {
      const received = Uint8Array.from({ length: 7 }, (_, j) => (bits >> j) & 1);
      const weight = received.reduce((sum, bit) => sum + bit, 0);
      const { index } = nearestWord(hamming).decode(received);
      const errors = hamming.rowStart[index + 1]! - hamming.rowStart[index]!;
      failed[weight] += errors > 0 ? 1 : 0;
      wrong[weight] += errors;
    }
    expect(failed).toEqual(F_w);
    expect(wrong).toEqual(B_w);
  });
});

describe('a shard of nearest words', () => {
  const spec = { words: lines, channel: { kind: 'bsc', p: 0.1 } as const, seed: 'words', framesPerShard: 20_000 };

  it('carries ⌊log2 M⌋ bits a word', () => {
    expect([2, 3, 4, 7, 8, 21].map(messageLength)).toEqual([1, 1, 2, 2, 3, 4]);
  });

  it('meets the exact word error rate, over all patterns and messages', async () => {
    const { decode } = nearestWord(lines);
    let rate = 0;
    for (let bits = 0; bits < 128; bits++) {
      const weight = bits.toString(2).replaceAll('0', '').length;
      for (let message = 0; message < 4; message++) {
        const received = Uint8Array.from({ length: 7 }, (_, j) => (bits >> j) & 1);
        for (const j of lines.colIndex.subarray(3 * message, 3 * message + 3)) received[j]! ^= 1;
        if (decode(received).index !== message) rate += (0.1 ** weight * 0.9 ** (7 - weight)) / 4;
      }
    }
    const tally = await runNearestWordShard(spec, 0);
    expect(tally.messageBits).toBe(40_000);
    expect(Math.abs(tally.wordErrors / 20_000 - rate)).toBeLessThan(4 * Math.sqrt((rate * (1 - rate)) / 20_000));
    expect(tally.messageBitErrors).toBeGreaterThanOrEqual(tally.wordErrors * 0.5);
  });

  it('gives up words beyond the detection radius, and then errs less', async () => {
    const plain = await runNearestWordShard(spec, 0);
    const careful = await runNearestWordShard({ ...spec, detectionRadius: 0 }, 0);
    expect(careful.detected).toBeGreaterThan(0);
    expect(careful.wordErrors).toBeLessThan(plain.wordErrors);
    expect(plain.detected).toBe(0);
  });

  it('is refused with one word, no frames, or p over a half', async () => {
    await expect(runNearestWordShard({ ...spec, words: matrixFromRows(3, [[0]]) }, 0)).rejects.toThrow(ParamError);
    await expect(runNearestWordShard({ ...spec, framesPerShard: 0 }, 0)).rejects.toThrow(ParamError);
    await expect(runNearestWordShard({ ...spec, channel: { kind: 'bsc', p: 0.6 } }, 0)).rejects.toThrow(ParamError);
    expect(() => nearestWord(matrixFromRows(3, []))).toThrow(ParamError);
  });
});

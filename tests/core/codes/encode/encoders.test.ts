import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { generatorPolynomial } from '../../../../src/core/codes/encode/generator-polynomial.ts';
import { denseEncoder, systematicEncoder } from '../../../../src/core/codes/encode/systematic-encoder.ts';
import { syndrome } from '../../../../src/core/codes/sparse-matrix.ts';
import { circulantMatrix, plainRank } from '../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';

describe('systematic encoders', () => {
  it('give words that satisfy every check and show the information bits', () => {
    fc.assert(
      fc.property(sparseMatrices(20, 40), fc.infiniteStream(fc.nat(1)), (H, bits) => {
        const encoder = systematicEncoder({ H });
        expect(encoder.k).toBe(H.cols - plainRank(H));
        const info = Uint8Array.from({ length: encoder.k }, () => bits.next().value!);
        const word = encoder.encode(info);
        expect(syndrome(H, word).every((s) => s === 0)).toBe(true);
        expect(encoder.infoPositions.every((c, i) => word[c] === info[i])).toBe(true);
      }),
      { numRuns: 200 },
    );
  });

  it('of a cyclic code by division agree with the dense one on which words are codewords', () => {
    const H = circulantMatrix(73, [0, 1, 3, 7, 15, 31, 36, 54, 63]);
    const cyclic = systematicEncoder({ H });
    expect(cyclic.method).toBe('polynomial division');
    expect(cyclic.k).toBe(denseEncoder(H).k);
    for (let i = 0; i < cyclic.k; i++) {
      const info = new Uint8Array(cyclic.k);
      info[i] = 1;
      expect(syndrome(H, cyclic.encode(info)).some((s) => s !== 0)).toBe(false);
    }
  });
});

describe('the generator polynomial', () => {
  it('of the Fano plane code has degree 4 and generates words that satisfy every check', () => {
    const H = circulantMatrix(7, [0, 1, 3]);
    const g = generatorPolynomial({ H })!;
    expect(g.toString(2)).toHaveLength(5);
    const word = Uint8Array.from({ length: 7 }, (_, i) => Number((g >> BigInt(i)) & 1n));
    expect(syndrome(H, word).every((s) => s === 0)).toBe(true);
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { degreeOf, dividePolynomials, exponentsOf, xToTheNMinusOne } from '@/core/algebra/gf2-polynomial.ts';
import { circulantGenerator, circulantWords } from '@/core/codes/encode/circulant-generator.ts';
import { cyclicGenerator } from '@/core/codes/encode/generator-polynomial.ts';
import { systematicEncoder } from '@/core/codes/encode/systematic-encoder.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { matrixFromRows, type SparseMatrix, syndrome } from '@/core/codes/sparse-matrix.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { FormatError, LimitError, ParamError } from '@/core/errors.ts';
import { readGeneratorCirculants, writeGeneratorCirculants } from '@/core/formats/generator-circulants.ts';
import { readGeneratorPolynomial, writeGeneratorPolynomial } from '@/core/formats/generator-polynomial.ts';
import { readGeneratorSystematic, writeGeneratorSystematic } from '@/core/formats/generator-systematic.ts';
import { polynomialFromHex, polynomialToHex, wordFromHex, wordToHex } from '@/core/formats/hexadecimal.ts';
import { circulantBlockSize } from '@/core/formats/quasi-cyclic.ts';
import { rank } from '@/core/gf2/rank.ts';
import { quasiCyclicMatrix, smallMatrix } from '../../models/random-matrix.ts';

const plane = (q: number) =>
  deriveLdpc(buildDesign({ family: 'projective-plane', params: { q } }), { checks: 'blocks' }).H;

const onesOf = (word: Uint8Array) => Array.from(word.keys()).filter((i) => word[i]);
const rankOfWords = (n: number, words: Uint8Array[]) => (words.length ? rank(matrixFromRows(n, words.map(onesOf))) : 0);

function expectBasis(H: SparseMatrix, words: Uint8Array[]): void {
  expect(words.length).toBe(H.cols - rank(H));
  expect(rankOfWords(H.cols, words)).toBe(words.length);
  for (const word of words) expect(syndrome(H, word).every((bit) => bit === 0)).toBe(true);
}

describe('a generator by circulants', () => {
  test('is a basis of every quasi-cyclic code, of whatever rank', () => {
    fc.assert(
      fc.property(quasiCyclicMatrix, (H) => {
        fc.pre(circulantBlockSize(H) !== null);
        const generator = circulantGenerator(H);
        expectBasis(H, [...circulantWords(generator)]);
        expect(readGeneratorCirculants(writeGeneratorCirculants(H))).toEqual(generator);
      }),
      { numRuns: 150 },
    );
  });

  test('has a divisor of x^z + 1 where each row begins, and the row stands for as many shifts as the degree leaves', () => {
    fc.assert(
      fc.property(quasiCyclicMatrix, (H) => {
        fc.pre(circulantBlockSize(H) !== null);
        const { z, rows } = circulantGenerator(H);
        for (const { shifts, polynomials } of rows) {
          const pivot = polynomials.find((f) => degreeOf(f) >= 0)!;
          expect(degreeOf(dividePolynomials(xToTheNMinusOne(z), pivot).remainder)).toBe(-1);
          expect(shifts).toBe(z - degreeOf(pivot));
        }
      }),
      { numRuns: 150 },
    );
  });

  test('of a cyclic code is its generator polynomial', () => {
    const H = plane(16);
    const { z, rows } = circulantGenerator(H);
    expect([z, rows.length, rows[0]!.shifts]).toEqual([273, 1, 191]);
    expect(exponentsOf(rows[0]!.polynomials[0]!)).toEqual(exponentsOf(cyclicGenerator(H)!));
  });

  test('is refused to a matrix without circulant blocks', () => {
    expect(() => writeGeneratorCirculants(matrixFromRows(3, [[0, 1], [2]]))).toThrow(ParamError);
  });
});

describe('a generator polynomial', () => {
  test('of the plane of order 16 has degree 82 and comes back from its file', () => {
    const { n, g } = readGeneratorPolynomial(writeGeneratorPolynomial(plane(16)));
    expect([n, degreeOf(g)]).toEqual([273, 82]);
  });

  test('that does not divide x^n + 1, or disagrees with its number, is refused with its line', () => {
    const text = new TextDecoder().decode(writeGeneratorPolynomial(plane(2)));
    const edited = (from: RegExp, to: string) => new TextEncoder().encode(text.replace(from, to));
    expect(() => readGeneratorPolynomial(edited(/hexadecimal=\w+/, 'hexadecimal=3'))).toThrow(/line 9.*the number of/);
    expect(() => readGeneratorPolynomial(edited(/^n=7/m, 'n=8'))).toThrow(FormatError);
  });

  test('is refused to a code that is not cyclic', () => {
    expect(() => writeGeneratorPolynomial(matrixFromRows(3, [[0, 1]]))).toThrow(ParamError);
  });
});

describe('a systematic generator', () => {
  test('comes back from its file and encodes as the encoder does', () => {
    fc.assert(
      fc.property(smallMatrix, fc.array(fc.nat(1), { minLength: 12, maxLength: 12 }), (H, bits) => {
        const encoder = systematicEncoder({ H });
        const { infoPositions, parityPositions, parity } = readGeneratorSystematic(writeGeneratorSystematic(H));
        expect(infoPositions).toEqual(encoder.infoPositions);
        const info = Uint8Array.from(bits.slice(0, encoder.k));
        const word = new Uint8Array(H.cols);
        infoPositions.forEach((c, i) => {
          word[c] = info[i]!;
          for (let j = 0; info[i] && j < parityPositions.length; j++) word[parityPositions[j]!]! ^= parity[i]![j]!;
        });
        expect(word).toEqual(encoder.encode(info));
      }),
      { numRuns: 200 },
    );
  });
});

describe.each([
  ['polynomial', writeGeneratorPolynomial, readGeneratorPolynomial],
  ['circulants', writeGeneratorCirculants, readGeneratorCirculants],
  ['systematic', writeGeneratorSystematic, readGeneratorSystematic],
] as const)('a damaged %s file', (_form, write, read) => {
  test('is a typed error or another generator, never anything else', () => {
    const whole = write(plane(4));
    const mutation = fc.record({ cut: fc.nat(whole.length), at: fc.nat(whole.length - 1), byte: fc.nat(255) });
    fc.assert(
      fc.property(mutation, ({ cut, at, byte }) => {
        const bytes = whole.slice(0, cut);
        if (at < bytes.length) bytes[at] = byte;
        try {
          read(bytes);
        } catch (error) {
          expect(error instanceof FormatError || error instanceof LimitError, String(error)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});

test('words and polynomials come back from hexadecimal', () => {
  expect(wordToHex(Uint8Array.of(1, 0, 0, 0, 1, 1))).toBe('8c');
  expect(wordFromHex('8c', 6)).toEqual(Uint8Array.of(1, 0, 0, 0, 1, 1));
  expect(wordFromHex('8d', 6)).toBeNull();
  expect(polynomialToHex(Uint32Array.of(0b1011))).toBe('b');
  fc.assert(
    fc.property(fc.uint8Array({ max: 1, maxLength: 90 }), (word) => {
      expect(wordFromHex(wordToHex(word), word.length)).toEqual(word);
    }),
  );
  fc.assert(
    fc.property(fc.uniqueArray(fc.nat(200)), (exponents) => {
      const f = new Uint32Array(7);
      for (const e of exponents) f[e >>> 5]! |= 1 << (e & 31);
      expect(exponentsOf(polynomialFromHex(polynomialToHex(f))!)).toEqual(exponents.sort((a, b) => a - b));
    }),
  );
});

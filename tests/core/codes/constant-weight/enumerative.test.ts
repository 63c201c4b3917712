import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { deriveConstantWeight } from '../../../../src/core/codes/constant-weight/constant-weight-code.ts';
import { choose, coverEncoder, tableEncoder } from '../../../../src/core/codes/constant-weight/enumerative.ts';
import { designFromBlocks } from '../../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { plainWords } from '../../../models/constant-weight.ts';

describe('the numbering of all words of a weight', () => {
  it('is their place in lexicographic order', () => {
    for (let n = 1; n <= 10; n++) {
      for (let w = 0; w <= n; w++) {
        const encoder = coverEncoder(n, w);
        const words = plainWords(n, w);
        expect(encoder.count).toBe(BigInt(words.length));
        words.forEach((word, i) => {
          expect(encoder.index(word)).toBe(BigInt(i));
          expect(Array.from(encoder.word(BigInt(i)))).toEqual(word);
        });
      }
    }
  });

  it('goes both ways on 4,096 bits', () => {
    const encoder = coverEncoder(4096, 2048);
    expect(encoder.messageBits).toBe(4089);
    for (const index of [0n, 12345678901234567890n, encoder.count / 3n, encoder.count - 1n]) {
      expect(encoder.index(encoder.word(index))).toBe(index);
    }
  });

  it('gives messages words and takes them back', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.nat(60), fc.infiniteStream(fc.nat(1)), (n, pick, bits) => {
        const w = pick % (n + 1);
        const encoder = coverEncoder(n, w);
        const message = Uint8Array.from({ length: encoder.messageBits }, () => bits.next().value!);
        const word = encoder.encode(message);
        expect(word.reduce((sum, bit) => sum + bit, 0)).toBe(w);
        expect(encoder.decode(word)).toEqual(message);
        expect(2n ** BigInt(encoder.messageBits) <= choose(n, w)).toBe(true);
      }),
    );
  });

  it('refuses numbers, weights and messages out of range, by name', () => {
    expect(() => coverEncoder(5000, 3)).toThrow(/n: got 5000/);
    expect(() => coverEncoder(5, 6)).toThrow(/w: got 6/);
    const encoder = coverEncoder(5, 2);
    expect(() => encoder.word(10n)).toThrow(/index: got 10; accepted is a number from 0 to 9/);
    expect(() => encoder.encode(new Uint8Array(4))).toThrow(/3 message bits/);
    expect(encoder.index([1, 1])).toBeNull();
    expect(encoder.index([3, 7])).toBeNull();
    expect(encoder.decode(Uint8Array.of(1, 1, 1, 0, 0))).toBeNull();
  });
});

describe('the numbering of a code’s words', () => {
  const code = deriveConstantWeight(buildDesign({ family: 'witt', params: { v: 24 } }));
  const encoder = tableEncoder(code);

  it('is lexicographic and goes both ways for each of the 759 octads', () => {
    let before: number[] = [];
    for (let i = 0n; i < 759n; i++) {
      const word = Array.from(encoder.word(i));
      expect(encoder.index(word)).toBe(i);
      if (i > 0n) {
        const at = word.findIndex((p, j) => p !== before[j]);
        expect(word[at]!).toBeGreaterThan(before[at]!);
      }
      before = word;
    }
  });

  it('carries nine bits in each of the first 512', () => {
    expect(encoder.messageBits).toBe(9);
    for (let m = 0; m < 512; m++) {
      const message = Uint8Array.from(m.toString(2).padStart(9, '0'), Number);
      const word = encoder.encode(message);
      expect(encoder.decode(word)).toEqual(message);
    }
  });

  it('has no number for a word outside, no message for a word past the last', () => {
    expect(encoder.index([0, 1, 2, 3, 4, 5, 6, 7].map((p) => p + 1))).toBe(encoder.index([1, 2, 3, 4, 5, 6, 7, 8]));
    expect(encoder.index([0, 1])).toBeNull();
    const past = new Uint8Array(24);
    for (const p of encoder.word(758n)) past[p] = 1;
    expect(encoder.decode(past)).toBeNull();
  });

  it('is refused for no words and for a word twice', () => {
    expect(() => tableEncoder(deriveConstantWeight(designFromBlocks(3, [])))).toThrow(/at least one word/);
    expect(() => tableEncoder(deriveConstantWeight(designFromBlocks(3, [[0], [0]])))).toThrow(/distinct words/);
  });
});

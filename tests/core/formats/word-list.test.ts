import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { deriveConstantWeight } from '@/core/codes/constant-weight/constant-weight-code.ts';
import { tableEncoder } from '@/core/codes/constant-weight/enumerative.ts';
import { designFromBlocks } from '@/core/designs/block-design.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { readWordList, type WordList, writeWordListCsv, writeWordListText } from '@/core/formats/word-list.ts';

const forms = [
  ['text', writeWordListText],
  ['CSV', writeWordListCsv],
] as const;

const anyWords = fc.tuple(fc.integer({ min: 1, max: 20 }), fc.integer({ min: 0, max: 6 })).chain(([n, w]) =>
  fc
    .array(fc.uniqueArray(fc.nat(n - 1), { minLength: Math.min(n, w), maxLength: Math.min(n, w) }), {
      minLength: 1,
      maxLength: 12,
    })
    .map((blocks): WordList => deriveConstantWeight(designFromBlocks(n, blocks))),
);
const utf8 = (text: string) => new TextEncoder().encode(text);
const lists = ({ w, M, ones }: WordList) => Array.from({ length: M }, (_, i) => [...ones.slice(i * w, (i + 1) * w)]);
const inOrder = (words: WordList) =>
  lists(words).sort((a, b) => {
    const at = a.findIndex((p, j) => p !== b[j]);
    return at < 0 ? 0 : a[at]! - b[at]!;
  });

describe.each(forms)('a list of words as %s', (_name, write) => {
  test('comes back in the order of its ranks', () => {
    fc.assert(
      fc.property(anyWords, (words) => {
        const list = readWordList(write(words));
        expect([list.n, list.w, list.M]).toEqual([words.n, words.w, words.M]);
        expect(lists(list)).toEqual(inOrder(words));
      }),
      { numRuns: 300 },
    );
  });

  test('ranks a word as the enumerative encoder does', () => {
    const code = deriveConstantWeight(buildDesign({ family: 'witt', params: { v: 12 } }));
    const encoder = tableEncoder(code);
    lists(readWordList(write(code))).forEach((word, rank) => {
      expect(encoder.index(word)).toBe(BigInt(rank));
    });
  });

  test('cut or altered is a typed error or another list, never anything else', () => {
    const whole = write(deriveConstantWeight(buildDesign({ family: 'projective-plane', params: { q: 3 } })));
    const mutation = fc.record({ cut: fc.nat(whole.length), at: fc.nat(whole.length - 1), byte: fc.nat(255) });
    fc.assert(
      fc.property(mutation, ({ cut, at, byte }) => {
        const bytes = whole.slice(0, cut);
        if (at < bytes.length) bytes[at] = byte;
        try {
          readWordList(bytes);
        } catch (error) {
          expect(error instanceof FormatError || error instanceof LimitError, String(error)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('a list of words', () => {
  test('is written as stated', () => {
    const words = deriveConstantWeight(
      designFromBlocks(5, [
        [1, 4],
        [0, 3],
      ]),
    );
    expect(new TextDecoder().decode(writeWordListText(words))).toBe(
      '# words of constant weight, one a line: rank, colon, positions of ones\n# length=5 weight=2 words=2 counted-from=0\n0: 0 3\n1: 1 4\n',
    );
    expect(new TextDecoder().decode(writeWordListCsv(words))).toBe(
      '# length=5 weight=2 words=2 counted-from=0\nrank,one1,one2\n0,0,3\n1,1,4\n',
    );
  });

  test.each([
    ['', /line 1, column 1: expected the line "# length/],
    ['0: 1 2\n', /expected the line "# length/],
    ['# length=5 weight=6 words=1\n', /a weight of 5 or less/],
    ['# length=5 weight=2 words=2\n0: 0 3\n', /2 words, found the end of the file after 1/],
    ['# length=5 weight=2 words=1\n0: 0 5\n', /line 2.*positions from 0 to 4, found 5/],
    ['# length=5 weight=2 words=1\n0: 3 0\n', /ascending positions/],
    ['# length=5 weight=2 words=1\n1: 0 3\n', /rank 0, found 1/],
    ['# length=5 weight=2 words=1\n0: 0\n', /2 positions of ones/],
    ['# length=5 weight=2 words=1\n0: 0 3 4\n', /end of the line after 2 ones/],
    ['# length=5 weight=2 words=2\n0: 1 3\n1: 0 3\n', /lexicographic order/],
    ['# length=5 weight=2 words=1\n0: 0 3\n1: 0 4\n', /the end of the file after 1 words/],
    ['# length=5 weight=2 words=1 counted-from=1\n0: 1 3\n', /counted-from=0, found 1/],
  ])('%j is refused with its place', (text, message) => {
    expect(() => readWordList(utf8(text))).toThrow(message);
  });
});

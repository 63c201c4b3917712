import { describe, expect, it } from 'vitest';
import { deriveConstantWeight } from '../../../../src/core/codes/constant-weight/constant-weight-code.ts';
import { constantWeightSheet } from '../../../../src/core/codes/constant-weight/constant-weight-sheet.ts';
import { designFromBlocks } from '../../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';

const sheetOf = (family: string, params: Record<string, number | string>, complement = false) =>
  constantWeightSheet(deriveConstantWeight(buildDesign({ family, params }), { complement }));
const textOf = ({ properties }: ReturnType<typeof constantWeightSheet>, key: string) =>
  properties.find((property) => property.key === key)?.text;

describe('the sheet of a constant-weight code', () => {
  it('tells all of a Kirkman system of 15 points', () => {
    const sheet = sheetOf('kirkman-triple', { v: 15 });
    expect(Object.fromEntries(sheet.properties.map(({ key, text }) => [key, text]))).toMatchObject({
      n: '15',
      w: '3',
      words: '35',
      distance: '4',
      'size-bound': '35',
      'size-share': '100 %',
      optimality: 'optimal: no code has more words',
      'message-bits': '5',
      'all-words-bits': '8',
      correction: '1',
      detection: '3',
      unidirectional: 'all',
      balance: '3 ones, 12 zeros',
      disjunct: '2',
      shortened: '1 there: (14, 2), 7 words; 0 there: (14, 3), 28 words',
      complement: 'weight 12, 35 words, distance 4',
      classes: '7 disjoint codes of 5 words, distance 6 in each',
    });
  });

  it('grades every line and says how each was found', () => {
    for (const { key, label, text, grade, method } of sheetOf('witt', { v: 12 }).properties) {
      expect(['proved', 'computed', 'bounded', 'sampled'], key).toContain(grade);
      expect(
        [label, text, method].every((part) => part.length > 0),
        key,
      ).toBe(true);
    }
  });

  it('flags the balanced words of S(5, 6, 12)', () => {
    const sheet = sheetOf('witt', { v: 12 });
    expect(sheet.balanced).toBe(true);
    expect(textOf(sheet, 'balance')).toContain('balanced');
    expect(sheetOf('witt', { v: 11 }).balanced).toBe(false);
  });

  it('holds an optical orthogonal code where the words are cyclic, for complements too', () => {
    expect(textOf(sheetOf('cyclic-difference-family', { v: 37, k: 4, lambda: 1 }), 'optical')).toBe(
      '(37, 4, 1), 3 words, optimal',
    );
    expect(sheetOf('projective-plane', { q: 3 }, true).optical?.words).toHaveLength(1);
    expect(sheetOf('witt', { v: 12 }).optical).toBeNull();
  });

  it('says what the budget left open, and never calls it computed', () => {
    const { resolution, properties } = constantWeightSheet(
      deriveConstantWeight(buildDesign({ family: 'witt', params: { v: 24 } })),
      { resolutionNodes: 10, coverSteps: 1 },
    );
    expect(resolution.reason).toBe('limit');
    expect(properties.find(({ key }) => key === 'classes')).toMatchObject({ text: 'not found', grade: 'bounded' });
    expect(properties.find(({ key }) => key === 'disjunct')?.grade).toBe('bounded');
  });

  it('of one word, and of words that repeat, claims no size', () => {
    for (const blocks of [
      [[0, 1]],
      [
        [0, 1],
        [0, 1],
      ],
    ]) {
      const sheet = constantWeightSheet(deriveConstantWeight(designFromBlocks(4, blocks)));
      expect(sheet.size).toBeNull();
      expect(textOf(sheet, 'optimality')).toBeUndefined();
    }
    expect(constantWeightSheet(deriveConstantWeight(designFromBlocks(4, []))).messageBits).toBe(0);
  });
});

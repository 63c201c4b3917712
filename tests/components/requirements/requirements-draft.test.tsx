import { describe, expect, test } from 'vitest';
import type { Requirements } from '@/api/projects.ts';
import { draftFrom, judge, type NumberKey } from '@/components/requirements/draft.ts';
import { typedNumber } from '@/components/ui/typed-number.ts';

const stated: Requirements = {
  summary: 'Sectors of 4 KiB.',
  channel: { kind: 'bsc', p: 0.004 },
  targetUber: 1e-15,
  payloadBits: 32_768,
  lengthMin: 200,
  lengthMax: 4200,
  rateMin: 0.69,
  structure: 'cyclic',
  decoder: { kind: 'gallager-b', iterations: 20 },
};

const withNumber = (key: NumberKey, text: string) => {
  const draft = draftFrom(stated);
  return judge({ ...draft, numbers: { ...draft.numbers, [key]: text } });
};

describe('requirements as a draft', () => {
  test('come back unchanged when nothing is typed', () => {
    expect(judge(draftFrom(stated))).toEqual({ ok: true, requirements: stated });
  });

  test('a decoder with parameters the form does not show is kept as it was', () => {
    const r: Requirements = { ...stated, decoder: { kind: 'sum-product', iterations: 50, designP: 0.01 } };
    expect(judge(draftFrom(r))).toEqual({ ok: true, requirements: r });
  });

  test('ask for one target at least', () => {
    expect(withNumber('targetUber', '')).toEqual({
      ok: false,
      fields: { targetFer: 'at least one target: BER, FER or UBER' },
    });
  });

  test.each([
    ['targetUber', '0'],
    ['targetUber', '1'],
    ['targetUber', 'small'],
    ['rateMin', '1.2'],
    ['payloadBits', '12.5'],
    ['lengthMin', '-4'],
    ['columnWeightMax', '1001'],
  ] as const)('%s of %s is refused with what would be accepted', (key, text) => {
    const judged = withNumber(key, text);
    expect(judged.ok).toBe(false);
    expect(!judged.ok && judged.fields[key]).toMatch(/^a (whole )?number/);
  });

  test('a greatest length below the least is refused', () => {
    expect(withNumber('lengthMax', '100')).toMatchObject({
      ok: false,
      fields: { lengthMax: expect.stringContaining('not below the least') },
    });
  });

  test('p outside (0, 0.5] is refused by name', () => {
    for (const p of ['0', '0.6', '']) {
      const judged = judge({ ...draftFrom(stated), channel: { p } });
      expect(judged).toMatchObject({ ok: false, fields: { 'channel.p': expect.stringContaining('at most 0.5') } });
    }
  });
});

describe('a typed number', () => {
  test.each([
    ['1e-15', 1e-15],
    ['10^-15', 1e-15],
    ['10⁻¹⁵', 1e-15],
    ['1.5 × 10^−9', 1.5e-9],
    ['2×10⁻³', 2e-3],
    ['16 513', 16513],
    ['.5', 0.5],
    ['−4', -4],
    ['1000', 1000],
    ['100', 100],
  ])('%s is read as %d', (text, value) => {
    expect(typedNumber(text)).toBeCloseTo(value, 20);
  });

  test('empty text is no number given', () => {
    expect(typedNumber('  ')).toBeUndefined();
  });

  test.each(['0,05', 'abc', '1e', '--1', '1.2.3', 'Infinity', '0x10'])('%s is no number', (text) => {
    expect(typedNumber(text)).toBeNaN();
  });
});

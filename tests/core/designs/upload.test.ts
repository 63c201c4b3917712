import { describe, expect, it } from 'vitest';
import { blockOf } from '../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { designFromUpload } from '../../../src/core/designs/upload.ts';
import { ParamError } from '../../../src/core/errors.ts';

const blocksOf = (family: string, params: Record<string, number | string>) => {
  const design = buildDesign({ family, params });
  return Array.from({ length: design.b }, (_, i) => blockOf(design, i));
};

describe('designFromUpload', () => {
  it('finds the largest t of a list of blocks', () => {
    expect(designFromUpload(blocksOf('witt', { v: 24 }))).toMatchObject({ t: 5, lambda: 1 });
    expect(designFromUpload(blocksOf('witt', { v: 22 }))).toMatchObject({ t: 3, lambda: 1 });
    expect(designFromUpload(blocksOf('steiner-triple', { v: 15, method: 'bose' }))).toMatchObject({ t: 2, lambda: 1 });
    expect(designFromUpload(blocksOf('transversal', { k: 3, g: 5 }))).toMatchObject({ t: 1, lambda: 5 });
  });

  it('says t = 0 for an uneven list, with the point that shows it', () => {
    const { t, certificate, stoppedBy } = designFromUpload([
      [0, 1, 2],
      [0, 3, 4],
    ]);
    expect(t).toBe(0);
    expect(certificate.holds).toBe(false);
    expect(stoppedBy).toMatch(/whole number/);
    expect(
      designFromUpload([
        [0, 1],
        [2, 3],
        [0, 2],
      ]).t,
    ).toBe(0);
  });

  it('takes a million triples', () => {
    const blocks = Array.from({ length: 1_000_000 }, (_, i) => [i, i + 1, i + 2].map((x) => x % 1_000_000));
    expect(designFromUpload(blocks)).toMatchObject({ t: 1, lambda: 3 });
  });

  it('refuses no blocks, fractions and repeated points', () => {
    expect(() => designFromUpload([])).toThrow(ParamError);
    expect(() => designFromUpload([[0, 1.5]])).toThrow(ParamError);
    expect(() => designFromUpload([[1, 1]])).toThrow(ParamError);
  });
});

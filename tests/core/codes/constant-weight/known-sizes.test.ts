import { describe, expect, it } from 'vitest';
import { johnsonBound, refinedJohnsonBound } from '../../../../src/core/bounds/johnson-bound.ts';
import { deriveConstantWeight } from '../../../../src/core/codes/constant-weight/constant-weight-code.ts';
import { exactSize } from '../../../../src/core/codes/constant-weight/exact-sizes.ts';
import { knownSize } from '../../../../src/core/codes/constant-weight/known-size.ts';
import { SIZE_TABLE } from '../../../../src/core/codes/constant-weight/size-table.ts';
import { sizeVerdict } from '../../../../src/core/codes/constant-weight/size-verdict.ts';
import { shortenAt } from '../../../../src/core/codes/constant-weight/smaller-codes.ts';
import { designFromBlocks } from '../../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import reference from '../../../reference/constant-weight-sizes.json' with { type: 'json' };

type Entry = { parameters: Record<string, number>; value: unknown };
const entries = (prefix: string) =>
  Object.entries(reference as Record<string, Entry>).filter(
    ([id, { value }]) => id.startsWith(prefix) && typeof value === 'number',
  );
const verdictOf = (family: string, params: Record<string, number | string>) =>
  sizeVerdict(deriveConstantWeight(buildDesign({ family, params })))!;

describe('what is known of A(n, d, w)', () => {
  it('is the published value wherever the reference holds one', () => {
    for (const [id, { parameters, value }] of entries('D-A-')) {
      const { n, d, w } = parameters as { n: number; d: number; w: number };
      const { lower, upper } = knownSize(n, d, w);
      expect([lower.size, upper.size], id).toEqual([value, value]);
    }
    for (const [id, { parameters, value }] of [...entries('D-pack32-'), ...entries('D-pack43-')]) {
      const { v, k, t } = parameters as { v: number; k: number; t: number };
      const { lower, upper } = knownSize(v, 2 * (k - t + 1), k);
      expect([lower.size, upper.size], id).toEqual([value, value]);
    }
  });

  it('of exact theorems never passes Johnson’s bound, nor falls with n', () => {
    for (const [d, w] of [
      [4, 3],
      [4, 4],
      [6, 4],
    ] as const) {
      for (let n = 2 * w; n <= 300; n++) {
        const size = exactSize(n, d, w)!.size;
        expect(size, `A(${n}, ${d}, ${w})`).toBeLessThanOrEqual(refinedJohnsonBound(n, d, w));
        expect(size).toBeGreaterThanOrEqual(exactSize(n - 1, d, w)!.size);
      }
    }
  });

  it('keeps its lower end below its upper end, and no table row passes Johnson’s bound', () => {
    for (let n = 2; n <= 32; n++) {
      for (let w = 1; w < n; w++) {
        for (let d = 1; d <= 2 * w; d++) {
          const { lower, upper } = knownSize(n, d, w);
          expect(lower.size, `A(${n}, ${d}, ${w})`).toBeLessThanOrEqual(upper.size);
          expect(upper.size).toBeLessThanOrEqual(Math.max(1, johnsonBound(n, d + (d % 2), w)));
        }
      }
    }
    for (const { n, d, w, size, status } of SIZE_TABLE) {
      if (status === 'checked') expect(refinedJohnsonBound(n, d, w), `A(${n}, ${d}, ${w})`).toBe(size);
      else expect(refinedJohnsonBound(n, d, w)).toBeGreaterThanOrEqual(size);
    }
  });

  it('is refused for a weight beyond the length', () => {
    expect(() => knownSize(5, 4, 6)).toThrow(/w: got 6/);
  });
});

describe('the verdict on a code’s size', () => {
  it.each([
    ['projective-plane', { q: 4 }, 'Steiner system S(2, 5, 21)'],
    ['steiner-triple', { v: 31, method: 'projective' }, 'Steiner system S(2, 3, 31)'],
    ['witt', { v: 24 }, 'Steiner system S(5, 8, 24)'],
    ['hermitian-unital', { q: 3 }, 'Steiner system S(2, 4, 28)'],
    ['hadamard', { order: 16 }, 'Johnson'],
    ['hadamard', { order: 32 }, 'Johnson'],
    ['transversal', { k: 3, g: 1 + 1 }, 'packings'],
  ] as const)('on %s %j is optimal, and says by what', (family, params, by) => {
    const { optimality } = verdictOf(family, params);
    expect([optimality.value, optimality.grade]).toEqual(['optimal', 'proved']);
    expect(optimality.method).toContain(by);
    expect(optimality.source).toBeDefined();
  });

  it('on a code with fewer words than a known one says so', () => {
    const { value, grade } = verdictOf('transversal', { k: 3, g: 5 }).optimality;
    expect([value, grade]).toEqual(['smaller', 'proved']);
  });

  it('on the eighteen blocks of S(3, 4, 10) off a point is optimal by Hanani', () => {
    const code = shortenAt(deriveConstantWeight(buildDesign({ family: 'steiner-quadruple', params: { v: 10 } })), 0, 0);
    expect(sizeVerdict(code)!.optimality).toMatchObject({ value: 'optimal', source: { authors: 'H. Hanani' } });
  });

  it('on the word of a recalled table row alone proves nothing', () => {
    // Thirty words of weight 8 on 16 bits meet Johnson’s bound; twelve of (12, 6, 5) rest on the table alone.
    expect(knownSize(16, 8, 8).upper.size).toBe(30);
    expect(knownSize(12, 6, 5)).toMatchObject({ upper: { size: 14 }, published: { size: 12, status: 'recalled' } });
  });

  it('is withheld from words that repeat', () => {
    expect(
      sizeVerdict(
        deriveConstantWeight(
          designFromBlocks(4, [
            [0, 1],
            [0, 1],
          ]),
        ),
      ),
    ).toBeNull();
  });
});

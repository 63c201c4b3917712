import { describe, expect, test } from 'vitest';
import { primePowersUpTo } from '../../../../src/core/algebra/integers.ts';
import { type BlockDesign, blockOf } from '../../../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../../../src/core/designs/design.ts';
import { boseDifferenceSet, singerDifferenceSet } from '../../../../src/core/designs/geometry/singer.ts';
import { InfeasibleError, LimitError, ParamError } from '../../../../src/core/errors.ts';

const spec = (family: string, q: number) => ({ family, params: { q } });

describe('projective planes', () => {
  test('the Singer set of every order up to 256 is a perfect difference set', () => {
    for (const q of primePowersUpTo(256)) {
      const n = q * q + q + 1;
      const set = singerDifferenceSet(q, 2);
      const seen = new Uint16Array(n);
      for (const x of set) for (const y of set) seen[(x - y + n) % n]!++;
      expect(seen[0] === q + 1 && seen.subarray(1).every((count) => count === 1), `q = ${q}`).toBe(true);
    }
  });

  test('PG(2,256) is built whole, block 0 a difference set and every block its translate', () => {
    const design = buildDesign(spec('projective-plane', 256));
    expect([design.v, design.b, design.blockPoints.length]).toEqual([65_793, 65_793, 16_908_801]);
    translatesOfTheFirst(design, [1, 12_345, 65_792]);
  });

  test('orders 6, 14, 21, 22, 30, 33 are refused by Bruck–Ryser–Chowla', () => {
    for (const q of [6, 14, 21, 22, 30, 33]) {
      for (const family of ['projective-plane', 'affine-plane', 'punctured-affine-plane']) {
        expect(ruleOf(family, q)).toBe('bruck-ryser-chowla');
      }
    }
  });

  test('order 10 is refused by the search of Lam, Thiel and Swiercz', () => {
    expect(ruleOf('projective-plane', 10)).toBe('order-ten');
  });

  test('order 12, which no rule forbids, is refused as no prime power', () => {
    expect(() => predictDesign(spec('projective-plane', 12))).toThrow(ParamError);
    expect(() => predictDesign(spec('projective-plane', 12))).toThrow('a prime power from 2 to 256');
  });

  test('order 257 passes the limit, and an order of a billion is answered at once', () => {
    expect(() => buildDesign(spec('projective-plane', 257))).toThrow(LimitError);
    expect(() => buildDesign(spec('projective-plane', 1e9))).toThrow(LimitError);
    expect(() => buildDesign(spec('affine-plane', 131))).toThrow(LimitError);
  });
});

describe('planes without the origin', () => {
  test('for every order up to 128, each difference but the multiples of q + 1 occurs once', () => {
    for (const q of primePowersUpTo(128)) {
      const n = q * q - 1;
      const set = boseDifferenceSet(q, 2);
      const seen = new Uint8Array(n);
      for (const x of set) for (const y of set) if (x !== y) seen[(x - y + n) % n]!++;
      expect(
        seen.every((count, d) => count === (d % (q + 1) === 0 ? 0 : 1)),
        `q = ${q}`,
      ).toBe(true);
    }
  });

  test('AG(2,256) without the origin is built whole', () => {
    const design = buildDesign(spec('punctured-affine-plane', 256));
    expect([design.v, design.blockPoints.length]).toEqual([65_535, 16_776_960]);
    translatesOfTheFirst(design, [1, 30_000, 65_534]);
  });
});

test('AG(2,128) comes with 129 parallel classes of 128 lines that partition its points', () => {
  const design = buildDesign(spec('affine-plane', 128));
  const sizes = new Uint32Array(129);
  const seen = new Uint8Array(129 * design.v);
  for (let i = 0; i < design.b; i++) {
    const parallelClass = design.classes![i]!;
    sizes[parallelClass]!++;
    for (const p of blockOf(design, i)) seen[parallelClass * design.v + p] = 1;
  }
  expect(sizes.every((size) => size === 128)).toBe(true);
  expect(seen.every((once) => once === 1)).toBe(true);
});

function ruleOf(family: string, q: number): string {
  try {
    predictDesign(spec(family, q));
  } catch (error) {
    if (error instanceof InfeasibleError) return error.rule;
    throw error;
  }
  return 'not refused';
}

function translatesOfTheFirst(design: BlockDesign, shifts: number[]): void {
  const first = [...blockOf(design, 0)];
  for (const shift of shifts) {
    const moved = first.map((p) => (p + shift) % design.v).sort((a, b) => a - b);
    expect([...blockOf(design, shift)]).toEqual(moved);
  }
}

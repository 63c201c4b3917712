import { describe, expect, test } from 'vitest';
import { deriveLdpc } from '../../../../src/core/codes/ldpc.ts';
import { type BlockDesign, blockOf, type DesignSpec } from '../../../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../../../src/core/designs/design.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, LimitError, ParamError } from '../../../../src/core/errors.ts';
import { eliminationRank } from '../../../models/rank.ts';

const design = (family: string, params: DesignSpec['params']) => buildDesign({ family, params });
const refuse = (family: string, params: DesignSpec['params']) => () => predictDesign({ family, params });
const rank = (d: BlockDesign) => eliminationRank(deriveLdpc(d, { checks: 'blocks' }).H);

describe('unitals', () => {
  test('the ranks of Hiss for q = 5 and 7 are those computed: 105 and 301', () => {
    expect(rank(design('hermitian-unital', { q: 5 }))).toBe(105);
    expect(rank(design('hermitian-unital', { q: 7 }))).toBe(301);
    expect(predictDesign({ family: 'hermitian-unital', params: { q: 7 } }).codes[0]!.rank.value.upper).toBe(301);
  });

  test('the unital of order 16 is a 2-(4097, 17, 1) design', () => {
    expect(verifyDesign(design('hermitian-unital', { q: 16 }), { t: 2, lambda: 1 }).holds).toBe(true);
  });

  test('the unital of order 9 falls into 81 parallel classes of 73 blocks, as Bose showed', () => {
    const unital = design('hermitian-unital', { q: 9 });
    const sizes = new Uint32Array(81);
    const covered = new Set<number>();
    for (let i = 0; i < unital.b; i++) {
      sizes[unital.classes![i]!]!++;
      for (const p of blockOf(unital, i)) covered.add(unital.classes![i]! * unital.v + p);
    }
    expect(new Set(sizes)).toEqual(new Set([73]));
    expect(covered.size).toBe(81 * 730);
  });

  test('the Ree unital has rank 19, the Hermitian one 21: they are not isomorphic', () => {
    expect(rank(design('ree-unital', { q: 3 }))).toBe(19);
    expect(rank(design('hermitian-unital', { q: 3 }))).toBe(21);
  });
});

describe('circles', () => {
  test('the inversive plane of order 16 is a 3-(257, 17, 1) design', () => {
    expect(verifyDesign(design('inversive-plane', { q: 16 }), { t: 3, lambda: 1 }).holds).toBe(true);
  });

  test('S(3,6,126) is a sphere of degree 3 over GF(5), of rank 125', () => {
    const sphere = design('spherical-geometry', { q: 5, d: 3 });
    expect(verifyDesign(sphere, { t: 3, lambda: 1 }).holds).toBe(true);
    expect(rank(sphere)).toBe(125);
  });

  test('inversive planes of orders 6 and 12 do not exist, one of order 15 is not built, 37 passes the limit', () => {
    expect(refuse('inversive-plane', { q: 6 })).toThrow(InfeasibleError);
    expect(refuse('inversive-plane', { q: 12 })).toThrow(InfeasibleError);
    expect(refuse('inversive-plane', { q: 15 })).toThrow(ParamError);
    expect(refuse('inversive-plane', { q: 37 })).toThrow(LimitError);
    expect(refuse('spherical-geometry', { q: 11, d: 3 })).toThrow(LimitError);
  });
});

describe('maximal arcs', () => {
  test('degree q/2 has the rank 3^s − 2^s of an oval design, computed for q = 16 and 32', () => {
    expect(rank(design('denniston', { q: 16, n: 8 }))).toBe(65);
    expect(rank(design('denniston', { q: 32, n: 16 }))).toBe(211);
  });

  test('every degree in the plane of order 64 gives a 2-design', () => {
    for (const n of [2, 4, 8, 16, 32]) {
      expect(verifyDesign(design('denniston', { q: 64, n }), { t: 2, lambda: 1 }).holds, `n = ${n}`).toBe(true);
    }
  });

  test('planes of odd order have none, by Ball, Blokhuis and Mazzocca', () => {
    expect(refuse('denniston', { q: 9, n: 3 })).toThrow(InfeasibleError);
    expect(refuse('denniston', { q: 16, n: 3 })).toThrow(ParamError);
    expect(refuse('denniston', { q: 16, n: 16 })).toThrow(ParamError);
    expect(refuse('denniston', { q: 128, n: 2 })).toThrow(LimitError);
  });
});

describe('generalised polygons', () => {
  test.each([
    ['W', 4],
    ['Q4', 3],
    ['H3', 2],
    ['H3', 3],
    ['H4', 2],
    ['T2star', 4],
    ['T2star', 8],
  ])('%s(%i): a point off a line is collinear with exactly one point of it', (kind, q) => {
    const quadrangle = design('generalised-quadrangle', { kind, q });
    const { v, b } = quadrangle;
    const collinear = new Uint8Array(v * v);
    for (let i = 0; i < b; i++)
      for (const x of blockOf(quadrangle, i)) for (const y of blockOf(quadrangle, i)) collinear[x * v + y] = 1;
    const joined = new Set<number>();
    for (let i = 0; i < b; i++) {
      const line = blockOf(quadrangle, i);
      for (let x = 0; x < v; x++)
        if (!line.includes(x)) joined.add(line.reduce((sum, y) => sum + collinear[x * v + y]!, 0));
    }
    expect([...joined]).toEqual([1]);
  });

  test('the rank of W(16), by the formula of Sastry and Sin, is 1,890', () => {
    // Power sums of the roots of x² = x + 4: 2, 1, 9, 13, 49, 101, 297, 701, 1889.
    expect(
      predictDesign({ family: 'generalised-quadrangle', params: { kind: 'W', q: 16 } }).codes[0]!.rank.value,
    ).toEqual({
      lower: 1890,
      upper: 1890,
    });
  });

  test('H(4) has 1,365 points and its rank lies in the predicted enclosure', () => {
    const { lower, upper } = predictDesign({ family: 'split-cayley-hexagon', params: { q: 4 } }).codes[0]!.rank.value;
    const computed = rank(design('split-cayley-hexagon', { q: 4 }));
    expect(lower <= computed && computed <= upper).toBe(true);
  });

  test('orders that do not exist or pass the limit are refused', () => {
    expect(refuse('generalised-quadrangle', { kind: 'T2star', q: 3 })).toThrow(ParamError);
    expect(refuse('generalised-quadrangle', { kind: 'W', q: 6 })).toThrow(ParamError);
    expect(refuse('generalised-quadrangle', { kind: 'H4', q: 7 })).toThrow(LimitError);
    expect(refuse('split-cayley-hexagon', { q: 5 })).toThrow(LimitError);
    expect(refuse('lu3', { q: 47 })).toThrow(LimitError);
  });
});

describe('flats', () => {
  test('points and planes of PG(3,4): a 2-(85, 21, 5) design', () => {
    const { t, v, b, k, lambda } = predictDesign({ family: 'projective-geometry', params: { m: 3, q: 4, flat: 2 } });
    expect({ t, v, b, k, lambda }).toEqual({ t: 2, v: 85, b: 85, k: 21, lambda: 5 });
  });

  test('planes of AG(4,2) are a Steiner quadruple system on 16 points', () => {
    const spec = { family: 'affine-geometry', params: { m: 4, q: 2, flat: 2 } };
    expect(predictDesign(spec)).toMatchObject({ t: 3, v: 16, k: 4, b: 140, lambda: 1 });
    expect(verifyDesign(buildDesign(spec), { t: 3, lambda: 1 }).holds).toBe(true);
  });

  test('a parameter that leaves out the origin’s choice keeps the origin', () => {
    expect(design('affine-geometry', { m: 2, q: 3, flat: 1 }).spec?.params.origin).toBe('with');
  });

  test('flats that are not proper, and geometries over the limits, are refused', () => {
    expect(refuse('projective-geometry', { m: 3, q: 2, flat: 3 })).toThrow(ParamError);
    expect(refuse('projective-geometry', { m: 3, q: 6, flat: 1 })).toThrow(ParamError);
    expect(refuse('projective-geometry', { m: 3, q: 25, flat: 1 })).toThrow(LimitError);
    expect(refuse('affine-geometry', { m: 16, q: 3, flat: 1 })).toThrow(LimitError);
  });
});

describe('5-designs of linear groups', () => {
  test('S(5,7,28) and S(5,6,48) hold every 5-subset once', () => {
    for (const v of [28, 48]) {
      expect(verifyDesign(design('linear-group-steiner', { v }), { t: 5, lambda: 1 }).holds, `v = ${v}`).toBe(true);
    }
  });

  test('their ranks are 23, 28 and 47', () => {
    expect([24, 28].map((v) => rank(design('linear-group-steiner', { v })))).toEqual([23, 28]);
    expect(predictDesign({ family: 'linear-group-steiner', params: { v: 48 } }).codes[0]!.rank.value.lower).toBe(47);
  });

  test('another number of points is refused with the list of those there are', () => {
    expect(refuse('linear-group-steiner', { v: 25 })).toThrow('one of 24, 28, 48, 84');
  });
});

describe('spreads', () => {
  test('PG(5,2) has spreads of lines and of planes, PG(4,2) has none', () => {
    expect(design('projective-spread', { m: 5, q: 2, flat: 1 }).b).toBe(21);
    expect(design('projective-spread', { m: 5, q: 2, flat: 2 }).b).toBe(9);
    expect(refuse('projective-spread', { m: 4, q: 2, flat: 1 })).toThrow(InfeasibleError);
  });

  test('every flat of a spread is a flat of the geometry in the same order of points', () => {
    for (const params of [
      { m: 3, q: 3, flat: 1 },
      { m: 5, q: 2, flat: 2 },
    ]) {
      const flats = design('projective-geometry', params);
      const known = new Set(Array.from({ length: flats.b }, (_, i) => blockOf(flats, i).join()));
      const spread = design('projective-spread', params);
      for (let i = 0; i < spread.b; i++) expect(known.has(blockOf(spread, i).join())).toBe(true);
    }
  });
});

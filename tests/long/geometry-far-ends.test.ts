import { describe, expect, it } from 'vitest';
import { buildDesign, predictDesign } from '../../src/core/designs/design.ts';
import { verifyDesign } from '../../src/core/designs/verify.ts';

// The largest member of every geometry that is built here, counted subset by subset (through verified symmetry where the
// certificate says so).
describe('the far end of every family of geometries', () => {
  it.each<[string, Record<string, number | string>]>([
    ['projective-plane', { q: 256 }],
    ['punctured-affine-plane', { q: 256 }],
    ['affine-plane', { q: 128 }],
    ['projective-geometry', { m: 2, q: 211, flat: 1 }],
    ['projective-geometry', { m: 3, q: 23, flat: 1 }],
    ['projective-geometry', { m: 7, q: 2, flat: 3 }],
    ['affine-geometry', { m: 3, q: 23, flat: 1, origin: 'with' }],
    ['affine-geometry', { m: 3, q: 23, flat: 2, origin: 'without' }],
    ['inversive-plane', { q: 32 }],
    ['spherical-geometry', { q: 3, d: 6 }],
    ['spherical-geometry', { q: 4, d: 5 }],
    ['hermitian-unital', { q: 16 }],
    ['denniston', { q: 64, n: 32 }],
    ['generalised-quadrangle', { kind: 'W', q: 43 }],
    ['generalised-quadrangle', { kind: 'Q4', q: 43 }],
    ['generalised-quadrangle', { kind: 'H3', q: 9 }],
    ['generalised-quadrangle', { kind: 'H4', q: 5 }],
    ['generalised-quadrangle', { kind: 'T2star', q: 32 }],
    ['lu3', { q: 43 }],
    ['split-cayley-hexagon', { q: 4 }],
    ['linear-group-steiner', { v: 84 }],
    ['projective-spread', { m: 5, q: 9, flat: 2 }],
    ['projective-spread', { m: 11, q: 2, flat: 1 }],
    ['projective-spread', { m: 11, q: 2, flat: 5 }],
    ['hadamard', { order: 1024, t: 2 }],
    ['hadamard', { order: 1024, t: 3 }],
    ['hadamard', { order: 1020, t: 3 }],
    ['transversal', { k: 256, g: 256 }],
  ])('%s %o', { timeout: 600_000 }, (family, params) => {
    const { t, v, b, k, lambda } = predictDesign({ family, params });
    const design = buildDesign({ family, params });
    expect([design.v, design.b, design.blockPoints.length]).toEqual([v, b, b * k]);
    expect(verifyDesign(design, { t, lambda }).holds).toBe(true);
  });
});

import { describe, expect, test } from 'vitest';
import type { DesignSpec } from '../../../src/core/designs/block-design.ts';
import { designTitle } from '../../../src/core/designs/design-title.ts';
import { families } from '../../../src/core/designs/families/index.ts';

describe('a design in words', () => {
  test.each<[DesignSpec, string]>([
    [{ family: 'projective-plane', params: { q: 16 } }, 'Projective plane PG(2,16)'],
    [{ family: 'affine-plane', params: { q: 8 } }, 'Affine plane AG(2,8)'],
    [{ family: 'transversal', params: { k: 4, g: 17 } }, 'Transversal design TD(4,17)'],
    [{ family: 'lu3', params: { q: 5 } }, 'LU(3,5) graph'],
    [{ family: 'split-cayley-hexagon', params: { q: 2 } }, 'Split Cayley hexagon H(2)'],
    [{ family: 'spherical-geometry', params: { q: 3, d: 2 } }, 'Spherical geometry S(3,4,10)'],
    [
      { family: 'projective-geometry', params: { m: 3, q: 2, flat: 1 } },
      'Flats of a projective geometry PG(3,2), flat = 1',
    ],
    [{ family: 'punctured-affine-plane', params: { q: 32 } }, 'Affine plane without the origin, q = 32'],
    [{ family: 'steiner-triple', params: { v: 15, method: 'bose' } }, 'Steiner triple system, v = 15, bose'],
    [
      { family: 'cyclic-difference-family', params: { v: 37, k: 4, lambda: 1 } },
      'Cyclic design from a difference family, v = 37, k = 4, λ = 1',
    ],
    [{ family: 'linear-group-steiner', params: { v: 24 } }, 'Steiner 5-design from orbits of PSL(2,q), v = 24'],
    [
      { family: 'derived', params: { of: { family: 'inversive-plane', params: { q: 5 } }, point: 0 } },
      'Derived design, (Inversive plane, q = 5), point = 0',
    ],
  ])('%j reads "%s"', (spec, words) => {
    expect(designTitle(spec)).toBe(words);
  });

  test('no two parameter sets of a family share their words', () => {
    for (const { id, enumerate } of families) {
      const titles: string[] = [];
      for (const params of enumerate({ maxPoints: 60, maxBlocks: 600 })) {
        titles.push(designTitle({ family: id, params: params as DesignSpec['params'] }));
        if (titles.length === 200) break;
      }
      expect(new Set(titles).size, id).toBe(titles.length);
    }
  });
});

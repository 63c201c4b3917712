import { describe, expect, it } from 'vitest';
import { designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { searchExactCover } from '../../../src/core/designs/exact-cover.ts';
import {
  countResolutions,
  findResolution,
  isResolution,
  listParallelClasses,
  searchResolution,
} from '../../../src/core/designs/resolve.ts';
import { parallelClasses15 } from '../../reference/parallel-classes-15.ts';

describe('resolutions', () => {
  it('PG(3,2) has 56 spreads and 240 packings', () => {
    const design = buildDesign({ family: 'projective-geometry', params: { m: 3, q: 2, flat: 1 } });
    const { classes, complete } = listParallelClasses(design, { maxClasses: 1000, maxNodes: 1e6 });
    expect([classes.length, complete]).toEqual([56, true]);
    expect(countResolutions(design.b, classes, 1e7)).toBe(240);
  });

  it('triple systems on 15 points have the parallel classes and resolutions counted apart', () => {
    for (const { parallelClasses, resolutions, blocks } of parallelClasses15) {
      const design = designFromBlocks(15, blocks);
      const { classes } = listParallelClasses(design, { maxClasses: 1000, maxNodes: 1e6 });
      expect(classes.length).toBe(parallelClasses);
      expect(countResolutions(35, classes, 1e7)).toBe(resolutions);
      const outcome = searchResolution(design);
      expect(outcome.reason).toBe(resolutions > 0 ? 'found' : 'none');
      if (outcome.classes) expect(isResolution(design, outcome.classes)).toBe(true);
    }
  });

  it('says none where block size does not divide the points, and limit where the budget ends', () => {
    const fano = buildDesign({ family: 'steiner-triple', params: { v: 7, method: 'skolem' } });
    expect(searchResolution(fano)).toMatchObject({ classes: null, reason: 'none' });
    expect(findResolution(fano)).toBeNull();
    const large = buildDesign({ family: 'steiner-triple', params: { v: 99, method: 'bose' } });
    expect(searchResolution(large, { limit: 200 })).toMatchObject({ classes: null, reason: 'limit' });
  });

  it('finds a resolution of the affine plane of order 7 when its own is taken away', () => {
    const plane = buildDesign({ family: 'affine-plane', params: { q: 7 } });
    expect(searchResolution(plane).reason).toBe('given');
    const bare = { ...plane, classes: undefined };
    const outcome = searchResolution(bare, { seed: 'x' });
    expect(outcome.reason).toBe('found');
    expect(isResolution(bare, outcome.classes!)).toBe(true);
  });
});

describe('searchExactCover', () => {
  it('visits the perfect matchings of K8, 105 of them', () => {
    const edges: number[][] = [];
    for (let x = 0; x < 8; x++) for (let y = x + 1; y < 8; y++) edges.push([x, y]);
    let count = 0;
    const outcome = searchExactCover(8, edges, { maxNodes: 1e6, onSolution: () => ++count < 0 });
    expect([count, outcome.reason]).toEqual([105, 'exhausted']);
  });
});

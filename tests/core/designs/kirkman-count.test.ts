import { expect, it } from 'vitest';
import { automorphismGroup } from '../../../src/core/designs/automorphisms.ts';
import { type BlockDesign, designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { labelledCopies } from '../../../src/core/designs/design-counts.ts';
import { countResolutions, listParallelClasses } from '../../../src/core/designs/resolve.ts';
import { parallelClasses15 } from '../../reference/parallel-classes-15.ts';

/** Resolutions of one system, and how many labelled Kirkman systems its relabellings have: 15!/|Aut| of each. */
function kirkmanSystemsOn(design: BlockDesign): [string, bigint] {
  const { classes, complete } = listParallelClasses(design, { maxClasses: 1000, maxNodes: 1e6 });
  const resolutions = countResolutions(design.b, classes, 1e7)!;
  const { order } = automorphismGroup(design);
  expect(complete).toBe(true);
  return [`${resolutions} of a group of order ${order}`, BigInt(resolutions) * labelledCopies(15, order)];
}

it('four triple systems on 15 points carry resolutions, 15!·13/42 labelled Kirkman systems between them', () => {
  // Cole 1922: seven Kirkman systems on four of the eighty triple systems. Three of these are in the reference collection;
  // the fourth, whose group has order 12, was met by seeded climbing.
  const three = parallelClasses15.filter(({ resolutions }) => resolutions > 0);
  const systems = three.map(({ blocks }) => designFromBlocks(15, blocks));
  systems.push(buildDesign({ family: 'steiner-triple', params: { v: 15, method: 'random', seed: '500' } }));
  const counted = systems.map(kirkmanSystemsOn);
  expect(counted.map(([words]) => words)).toEqual([
    '240 of a group of order 20160',
    '24 of a group of order 288',
    '1 of a group of order 21',
    '2 of a group of order 12',
  ]);
  expect(counted.reduce((sum, [, copies]) => sum + copies, 0n)).toBe((1307674368000n * 13n) / 42n);
});

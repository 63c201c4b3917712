import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';

/** Blocks told apart by a line pattern: the parallel classes of a resolution or, without one, sets of blocks no two of
 *  which share a point. */
export interface BlockGroups {
  kind: 'classes' | 'disjoint';
  /** Group of each block, from 0. */
  of: Uint32Array;
  count: number;
}

/** A resolution's classes, renumbered from 0 in the order in which blocks name them. */
export function groupsFromClasses(classes: ArrayLike<number>): BlockGroups {
  const place = new Map<number, number>();
  const of = Uint32Array.from(classes, (id) => {
    if (!place.has(id)) place.set(id, place.size);
    return place.get(id)!;
  });
  return { kind: 'classes', of, count: place.size };
}

/** Puts each block in turn into the first group whose blocks it does not meet. */
export function disjointGroups(design: BlockDesign): BlockGroups {
  const taken: Uint8Array[] = [];
  const of = new Uint32Array(design.b);
  for (let i = 0; i < design.b; i++) {
    const block = blockOf(design, i);
    let group = taken.findIndex((points) => block.every((p) => points[p] === 0));
    if (group < 0) group = taken.push(new Uint8Array(design.v)) - 1;
    for (const p of block) taken[group]![p] = 1;
    of[i] = group;
  }
  return { kind: 'disjoint', of, count: taken.length };
}

/** Numbers of the blocks of each group, ascending. */
export function membersOf({ of, count }: BlockGroups): number[][] {
  const members: number[][] = Array.from({ length: count }, () => []);
  of.forEach((group, i) => {
    members[group]!.push(i);
  });
  return members;
}

export const groupName = ({ kind }: BlockGroups, group: number) => `${kind === 'classes' ? 'class' : 'group'} ${group}`;

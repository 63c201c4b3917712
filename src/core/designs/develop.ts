import { type BlockDesign, designFromBlocks, type Symmetry } from './block-design.ts';

/** The shift x ↦ x + 1 (mod v). */
export function cyclicSymmetry(v: number): Symmetry[] {
  return [{ order: v, pointPerm: Uint32Array.from({ length: v }, (_, x) => (x + 1) % v) }];
}

/** Length of the orbit of a block under x ↦ x + 1 (mod v): the least shift that gives the block again. */
export function orbitLength(v: number, block: readonly number[]): number {
  const points = new Set(block.map((x) => x % v));
  for (let s = 1; s < v; s++) {
    if (v % s === 0 && block.every((x) => points.has((x + s) % v))) return s;
  }
  return v;
}

/** The translates of base triples modulo v, orbit by orbit, one after the other; short orbits once. */
export function developTriples(v: number, base: readonly (readonly [number, number, number])[]): Uint32Array {
  const triples: number[] = [];
  for (const block of base) {
    const length = orbitLength(v, block);
    for (let s = 0; s < length; s++) for (const x of block) triples.push((x + s) % v);
  }
  return Uint32Array.from(triples);
}

/** The design of all translates of base blocks modulo v, orbit by orbit; short orbits once. */
export function developCyclically(v: number, base: readonly (readonly number[])[]): BlockDesign {
  const blocks: number[][] = [];
  for (const block of base) {
    const length = orbitLength(v, block);
    for (let s = 0; s < length; s++) blocks.push(block.map((x) => (x + s) % v));
  }
  return designFromBlocks(v, blocks, { symmetry: cyclicSymmetry(v) });
}

import { type BlockDesign, blockOf } from './block-design.ts';

/** Whether a permutation of the points maps the collection of blocks onto itself, counted with multiplicity.
 *  Exact: a commutative hash only chooses which blocks to compare point by point. */
export function mapsBlocksOntoThemselves(design: BlockDesign, pointPerm: ArrayLike<number>): boolean {
  const { v, b, blockPoints, blockStart } = design;
  if (!isPermutation(pointPerm, v)) return false;
  const keyOf = Uint32Array.from({ length: v }, (_, p) => scramble(p + 1));
  const buckets = bucketBlocks(design, keyOf);
  const used = new Uint8Array(b);
  const stamp = new Uint32Array(v);
  for (let i = 0; i < b; i++) {
    let key = 0;
    for (let e = blockStart[i]!; e < blockStart[i + 1]!; e++) {
      const image = pointPerm[blockPoints[e]!]!;
      stamp[image] = i + 1;
      key = (key + keyOf[image]!) >>> 0;
    }
    const size = blockStart[i + 1]! - blockStart[i]!;
    let match = buckets.head[key & buckets.mask]!;
    while (match !== 0 && !(used[match - 1] === 0 && isStamped(blockOf(design, match - 1), stamp, i + 1, size))) {
      match = buckets.next[match - 1]!;
    }
    if (match === 0) return false;
    used[match - 1] = 1;
  }
  return true;
}

/** Chains of blocks (numbered from 1) by the low bits of the sum of their points' keys. */
function bucketBlocks(design: BlockDesign, keyOf: Uint32Array): { head: Uint32Array; next: Uint32Array; mask: number } {
  const mask = 2 ** Math.min(26, Math.ceil(Math.log2(design.b + 1)) + 1) - 1;
  const head = new Uint32Array(mask + 1);
  const next = new Uint32Array(design.b);
  for (let i = design.b - 1; i >= 0; i--) {
    let key = 0;
    for (const p of blockOf(design, i)) key = (key + keyOf[p]!) >>> 0;
    next[i] = head[key & mask]!;
    head[key & mask] = i + 1;
  }
  return { head, next, mask };
}

function isStamped(block: Uint32Array, stamp: Uint32Array, mark: number, size: number): boolean {
  if (block.length !== size) return false;
  for (const p of block) if (stamp[p] !== mark) return false;
  return true;
}

function isPermutation(pointPerm: ArrayLike<number>, v: number): boolean {
  if (pointPerm.length !== v) return false;
  const seen = new Uint8Array(v);
  for (let p = 0; p < v; p++) {
    const image = pointPerm[p]!;
    if (!(image < v) || seen[image] === 1) return false;
    seen[image] = 1;
  }
  return true;
}

/** One point of every orbit of the group the permutations generate. */
export function orbitRepresentatives(v: number, generators: readonly ArrayLike<number>[]): number[] {
  const root = Uint32Array.from({ length: v }, (_, p) => p);
  const find = (p: number): number => {
    let top = p;
    while (root[top] !== top) top = root[top] = root[root[top]!]!;
    return top;
  };
  for (const perm of generators) {
    for (let p = 0; p < v; p++) {
      const a = find(p);
      const c = find(perm[p]!);
      if (a !== c) root[Math.max(a, c)] = Math.min(a, c);
    }
  }
  const representatives: number[] = [];
  for (let p = 0; p < v; p++) if (find(p) === p) representatives.push(p);
  return representatives;
}

/** Finaliser of MurmurHash3 (Appleby 2011): spreads consecutive numbers over 32 bits. */
function scramble(x: number): number {
  let h = x;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

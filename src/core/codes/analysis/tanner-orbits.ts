import type { Symmetry } from '../../designs/block-design.ts';
import { circulantOf } from '../../gf2/cyclic.ts';
import { blockShift, quasiCyclicForm } from '../../gf2/quasi-cyclic.ts';
import { rowIndex } from '../../gf2/row-index.ts';
import { rowOf, type SparseMatrix } from '../sparse-matrix.ts';

/** A set split by a group: one representative of each orbit, its size, and the orbit of each element. */
export interface Orbits {
  representatives: Uint32Array;
  sizes: Uint32Array;
  orbitOf: Uint32Array;
}

/** Columns and rows up to a group of symmetries of the Tanner graph. */
export interface TannerOrbits {
  columns: Orbits;
  rows: Orbits;
  /** Where the symmetry came from. */
  symmetry: 'none' | 'cyclic shift' | 'block shift' | 'given';
}

/** Which columns a count begins at, for the method that it states. */
export function orbitsText({ symmetry, columns }: TannerOrbits): string {
  if (symmetry === 'none') return 'every column';
  return `${columns.representatives.length} of ${columns.orbitOf.length} columns, one an orbit (${symmetry})`;
}

/** Orbits under the permutations given, each checked here to map the set of rows onto itself (one that does not is left
 *  out); without any, under the cyclic shift of all columns, or of blocks of columns, when the rows are closed under it. */
export function tannerOrbits(H: SparseMatrix, given: readonly Symmetry[] = []): TannerOrbits {
  const shift = Uint32Array.from({ length: H.cols }, (_, c) => (c + 1) % H.cols);
  const circulant = circulantOf(H);
  if (circulant) {
    const rowShift = Uint32Array.from({ length: H.rows }, (_, r) => (r + H.rows + circulant.step) % H.rows);
    return split(H, [{ columns: shift, rows: rowShift }], 'cyclic shift');
  }
  if (given.length > 0) {
    const found = given.flatMap((s) => symmetryOf(H, s.pointPerm) ?? []);
    if (found.length > 0) return split(H, found, 'given');
  }
  const byShift = H.cols > 1 && H.rows > 0 ? symmetryOf(H, shift) : null;
  if (byShift) return split(H, [byShift], 'cyclic shift');
  const form = quasiCyclicForm(H);
  const byBlocks = form && symmetryOf(H, blockShift(H.cols, form.size));
  return byBlocks ? split(H, [byBlocks], 'block shift') : split(H, [], 'none');
}

/** A permutation of the columns with the permutation of the rows it brings about. */
export interface TannerSymmetry {
  columns: Uint32Array;
  rows: Uint32Array;
}

/** What the permutation of the columns does to the rows; null when it does not map the set of rows onto itself. Equal
 *  rows are told apart by their order. */
export function symmetryOf(H: SparseMatrix, columns: Uint32Array): TannerSymmetry | null {
  if (columns.length !== H.cols) return null;
  const hit = new Uint8Array(H.cols);
  for (const c of columns) {
    if (c >= H.cols || hit[c]) return null;
    hit[c] = 1;
  }
  const find = rowIndex(H);
  const rows = new Uint32Array(H.rows);
  const taken = new Uint8Array(H.rows);
  for (let r = 0; r < H.rows; r++) {
    const image = find(
      rowOf(H, r).map((c) => columns[c]!),
      taken,
    );
    if (image < 0) return null;
    rows[r] = image;
    taken[image] = 1;
  }
  return { columns, rows };
}

function split(H: SparseMatrix, group: readonly TannerSymmetry[], symmetry: TannerOrbits['symmetry']): TannerOrbits {
  return {
    columns: orbitsUnder(
      H.cols,
      group.map((g) => g.columns),
    ),
    rows: orbitsUnder(
      H.rows,
      group.map((g) => g.rows),
    ),
    symmetry,
  };
}

function orbitsUnder(n: number, perms: readonly Uint32Array[]): Orbits {
  const unseen = 0xffffffff;
  const orbitOf = new Uint32Array(n).fill(unseen);
  const representatives: number[] = [];
  const sizes: number[] = [];
  for (let start = 0; start < n; start++) {
    if (orbitOf[start] !== unseen) continue;
    const orbit = representatives.length;
    const queue = [start];
    orbitOf[start] = orbit;
    for (let i = 0; i < queue.length; i++) {
      for (const perm of perms) {
        const image = perm[queue[i]!]!;
        if (orbitOf[image] !== unseen) continue;
        orbitOf[image] = orbit;
        queue.push(image);
      }
    }
    representatives.push(start);
    sizes.push(queue.length);
  }
  return { representatives: Uint32Array.from(representatives), sizes: Uint32Array.from(sizes), orbitOf };
}

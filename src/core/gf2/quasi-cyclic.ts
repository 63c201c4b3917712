import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { rowIndex } from './row-index.ts';

/** A matrix whose rows are closed under moving every block of `size` columns round by one place at once. */
export interface QuasiCyclicForm {
  size: number;
  blocks: number;
  /** One row of each orbit of rows: together they generate the row space as a module over GF(2)[x]/(x^size + 1). */
  generators: Uint32Array[];
  /** Length of each orbit; it divides `size`. */
  orbitSizes: Uint32Array;
}

/** The form with the largest blocks, or with blocks of the size given; null when there is none with two columns a block or
 *  more. Rows may stand in any order, and orbits may be short. A cyclic matrix is the case of one block. */
export function quasiCyclicForm(H: SparseMatrix, size?: number): QuasiCyclicForm | null {
  if (H.rows === 0 || H.cols < 2) return null;
  const sizes = size === undefined ? divisorsDescending(H.cols) : H.cols % size === 0 && size > 1 ? [size] : [];
  const find = rowIndex(H);
  for (const candidate of sizes) {
    const form = formOf(H, candidate, find);
    if (form) return form;
  }
  return null;
}

/** The permutation of the columns that moves every block by one place. */
export function blockShift(cols: number, size: number): Uint32Array {
  return Uint32Array.from({ length: cols }, (_, c) => (c % size === size - 1 ? c - size + 1 : c + 1));
}

/** Divisors from n down to 2. */
function divisorsDescending(n: number): number[] {
  const small: number[] = [];
  const large: number[] = [];
  for (let d = 1; d * d <= n; d++) {
    if (n % d !== 0) continue;
    large.push(n / d);
    if (d > 1 && d * d !== n) small.push(d);
  }
  return [...large, ...small.reverse()].filter((d) => d > 1);
}

function formOf(H: SparseMatrix, size: number, find: ReturnType<typeof rowIndex>): QuasiCyclicForm | null {
  const shift = blockShift(H.cols, size);
  const moved = (r: number) => rowOf(H, r).map((c) => shift[c]!);
  const seen = new Uint8Array(H.rows);
  const taken = new Uint8Array(H.rows);
  const generators: Uint32Array[] = [];
  const orbitSizes: number[] = [];
  for (let r = 0; r < H.rows; r++) {
    if (seen[r]) continue;
    let length = 0;
    for (let at = r; !seen[at]; length++) {
      seen[at] = 1;
      // Equal rows are told apart by their order, so that the shift permutes the rows.
      const next = find(moved(at), taken);
      if (next < 0) return null;
      taken[next] = 1;
      at = next;
    }
    generators.push(rowOf(H, r).slice());
    orbitSizes.push(length);
  }
  return { size, blocks: H.cols / size, generators, orbitSizes: Uint32Array.from(orbitSizes) };
}

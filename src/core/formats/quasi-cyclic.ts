import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { ParamError } from '../errors.ts';

/** The largest block size z for which every z × z block is a sum of shifted identities, or null when that is only z = 1. */
export function circulantBlockSize(H: SparseMatrix): number | null {
  const common = gcd(H.rows, H.cols);
  for (let z = common; z > 1; z--) {
    if (common % z === 0 && isBlockCirculant(H, z)) return z;
  }
  return null;
}

/** A table of shifts, in the convention of the IEEE 802.11 and 802.16 texts: entry s is the identity shifted right by s
 *  (row r has its one at column (r + s) mod z), −1 a zero block. A block with several ones a row lists its shifts joined
 *  by `+`.
 *  @throws ParamError when the matrix is not made of circulant blocks. */
export function writeQuasiCyclic(H: SparseMatrix): Uint8Array {
  const z = circulantBlockSize(H);
  if (z === null)
    throw new ParamError('format', 'qc', 'a matrix made of circulant blocks larger than 1 × 1; use alist or mtx');
  const lines = [
    '# shifts of the identity to the right; -1 is a zero block; + joins the shifts of one block',
    `z=${z} block-rows=${H.rows / z} block-columns=${H.cols / z}`,
  ];
  for (let i = 0; i < H.rows; i += z) {
    const shifts: number[][] = Array.from({ length: H.cols / z }, () => []);
    for (const c of rowOf(H, i)) shifts[Math.floor(c / z)]!.push(c % z);
    lines.push(shifts.map((list) => (list.length === 0 ? '-1' : list.join('+'))).join(' '));
  }
  return new TextEncoder().encode(`${lines.join('\n')}\n`);
}

/** Whether each row of a block row is the one above it with every block shifted right by one. */
function isBlockCirculant(H: SparseMatrix, z: number): boolean {
  const marks = new Uint32Array(H.cols);
  for (let i = 0; i < H.rows; i++) {
    if (i % z === 0) continue;
    const above = rowOf(H, i - 1);
    const row = rowOf(H, i);
    if (row.length !== above.length) return false;
    for (const c of row) marks[c] = i;
    for (const c of above) if (marks[c - (c % z) + ((c + 1) % z)] !== i) return false;
  }
  return true;
}

function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}

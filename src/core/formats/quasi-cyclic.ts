import { matrixFromRows, rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, ParamError } from '../errors.ts';
import { decodeText } from './decode-text.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';

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

/** @throws FormatError with line and column of what is wrong; LimitError on size. */
export function readQuasiCyclic(bytes: Uint8Array): SparseMatrix {
  const text = decodeText(bytes);
  const lines = text.split(/\r\n|\n|\r/).map((line, i) => ({ text: line, number: i + 1 }));
  const used = lines.filter((line) => line.text.trim() !== '' && !line.text.trimStart().startsWith('#'));
  const head = /^\s*z=(\d{1,7}) block-rows=(\d{1,7}) block-columns=(\d{1,7})\s*$/.exec(used[0]?.text ?? '');
  if (!head)
    throw new FormatError(
      used[0]?.number ?? 1,
      1,
      '"z=… block-rows=… block-columns=…"',
      JSON.stringify(used[0]?.text.slice(0, 40) ?? ''),
    );
  const [z, blockRows, blockCols] = head.slice(1).map(Number) as [number, number, number];
  if (z < 1 || blockRows < 1 || blockCols < 1) throw new FormatError(used[0]!.number, 1, 'sizes from 1', '0');
  refuseBeyondLimits(z * blockRows, z * blockCols, 0);
  if (used.length !== blockRows + 1)
    throw new FormatError(used.at(-1)!.number, 1, `${blockRows} lines of shifts`, String(used.length - 1));
  const table = used.slice(1).map((line) => readShifts(line, z, blockCols));
  refuseBeyondLimits(z * blockRows, z * blockCols, z * table.flat(2).length);
  const rows: number[][] = [];
  for (const shifts of table) {
    for (let r = 0; r < z; r++) rows.push(shifts.flatMap((list, block) => list.map((s) => block * z + ((r + s) % z))));
  }
  return matrixFromRows(z * blockCols, rows);
}

function readShifts(line: { text: string; number: number }, z: number, blockCols: number): number[][] {
  const cells = [...line.text.matchAll(/\S+/g)];
  if (cells.length !== blockCols)
    throw new FormatError(line.number, 1, `${blockCols} blocks on the line`, String(cells.length));
  return cells.map((cell) => {
    if (cell[0] === '-1') return [];
    const shifts = cell[0].split('+').map((part) => (/^\d{1,7}$/.test(part) ? Number(part) : z));
    if (shifts.some((s) => s >= z) || new Set(shifts).size !== shifts.length)
      throw new FormatError(
        line.number,
        cell.index + 1,
        `-1, or distinct shifts from 0 to ${z - 1} joined by +`,
        JSON.stringify(cell[0].slice(0, 20)),
      );
    return shifts;
  });
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

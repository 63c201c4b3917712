import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { FileBytes } from './byte-source.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';

const HASH = 35;
const PLUS = 43;
const MINUS = 45;

interface Sizes {
  z: number;
  blockRows: number;
  blockCols: number;
}

/** The shifts of one row of blocks: those of block j are shifts[start[j] .. start[j + 1]), ascending. */
interface BlockRow {
  start: Uint32Array;
  shifts: number[];
}

/** Reads a table as quasi-cyclic.ts writes it, where it lies: once to count, once to fill. Lines that begin with # and
 *  empty ones are passed over.
 *  @throws FormatError with line and column of what is wrong; LimitError on size. */
export function readQuasiCyclic(file: FileBytes): SparseMatrix {
  const scan = new TextScanner(file);
  const sizes = readSizes(scan);
  const { z, blockRows, blockCols } = sizes;
  const place = scan.mark();
  let ones = 0;
  readTable(scan, sizes, ({ shifts }) => {
    ones += z * shifts.length;
    refuseBeyondLimits(0, 0, ones);
  });
  scan.reset(place);
  const H = { rows: z * blockRows, cols: z * blockCols, ...emptyRows(z * blockRows, ones) };
  readTable(scan, sizes, (blockRow, i) => fillRows(H, i * z, z, blockRow));
  if (H.rowStart[H.rows] !== ones) throw scan.error('a file that stays as it is', 'one that changed on the way');
  return H;
}

const emptyRows = (rows: number, ones: number) => ({
  rowStart: new Uint32Array(rows + 1),
  colIndex: new Uint32Array(ones),
});

function readSizes(scan: TextScanner): Sizes {
  skipToLine(scan);
  const { line } = scan;
  const text = scan.restOfLine();
  const head = /^\s*z=(\d{1,7}) block-rows=(\d{1,7}) block-columns=(\d{1,7})\s*$/.exec(text);
  if (!head) throw scan.errorAtLine(line, '"z=… block-rows=… block-columns=…"', JSON.stringify(text.slice(0, 40)));
  const [z, blockRows, blockCols] = head.slice(1).map(Number) as [number, number, number];
  if (z < 1 || blockRows < 1 || blockCols < 1) throw scan.errorAtLine(line, 'sizes from 1', '0');
  refuseBeyondLimits(z * blockRows, z * blockCols, 0);
  return { z, blockRows, blockCols };
}

/** To the next line that says something. */
function skipToLine(scan: TextScanner): void {
  while (!scan.atEnd() && scan.peek() === HASH) scan.restOfLine();
}

function readTable(scan: TextScanner, sizes: Sizes, onRow: (row: BlockRow, i: number) => void): void {
  // Which block a shift was last seen in, counted over the whole table.
  const seen = new Float64Array(sizes.z);
  for (let i = 0; i < sizes.blockRows; i++) {
    skipToLine(scan);
    if (scan.atEnd()) throw scan.error(`${sizes.blockRows} lines of shifts`, String(i));
    onRow(readBlockRow(scan, sizes, seen, i * sizes.blockCols), i);
  }
  skipToLine(scan);
  if (!scan.atEnd()) throw scan.error(`${sizes.blockRows} lines of shifts`, scan.tokenAt());
}

function readBlockRow(scan: TextScanner, { z, blockCols }: Sizes, seen: Float64Array, before: number): BlockRow {
  const start = new Uint32Array(blockCols + 1);
  const shifts: number[] = [];
  const aShift = `-1, or distinct shifts from 0 to ${z - 1} joined by +`;
  for (let j = 0; j < blockCols; j++) {
    if (scan.atLineEnd()) throw scan.error(`${blockCols} blocks on the line`, String(j));
    if (scan.peek() === MINUS) {
      scan.take();
      if (scan.number(aShift, false) !== 1) throw scan.error(aShift, 'another negative number');
    } else {
      do {
        const shift = scan.number(aShift, false, PLUS);
        if (shift >= z || seen[shift] === before + j + 1) throw scan.error(aShift, String(shift));
        seen[shift] = before + j + 1;
        shifts.push(shift);
      } while (passedPlus(scan));
    }
    start[j + 1] = shifts.length;
    sortFrom(shifts, start[j]!);
  }
  if (!scan.atLineEnd()) throw scan.error(`${blockCols} blocks on the line`, 'more');
  return { start, shifts };
}

function passedPlus(scan: TextScanner): boolean {
  if (scan.peek() !== PLUS) return false;
  scan.take();
  return true;
}

function sortFrom(shifts: number[], from: number): void {
  for (let i = from + 1; i < shifts.length; i++) {
    if (shifts[i]! >= shifts[i - 1]!) continue;
    const sorted = shifts.slice(from).sort((a, b) => a - b);
    for (let j = 0; j < sorted.length; j++) shifts[from + j] = sorted[j]!;
    return;
  }
}

/** Row r has, of the block at column c·z, its ones at c·z + (r + s) mod z. Those that wrap round come first; going down the
 *  rows, one more of them does each time, so nothing needs sorting. */
function fillRows(H: SparseMatrix, first: number, z: number, { start, shifts }: BlockRow): void {
  const wraps = start.slice(1);
  let at = H.rowStart[first]!;
  for (let r = 0; r < z; r++) {
    for (let j = 0; j + 1 < start.length; j++) {
      const [from, to] = [start[j]!, start[j + 1]!];
      let wrap = wraps[j]!;
      while (wrap > from && shifts[wrap - 1]! + r >= z) wrap--;
      wraps[j] = wrap;
      const left = j * z + r;
      for (let e = wrap; e < to; e++) H.colIndex[at++] = left + shifts[e]! - z;
      for (let e = from; e < wrap; e++) H.colIndex[at++] = left + shifts[e]!;
    }
    H.rowStart[first + r + 1] = at;
  }
}

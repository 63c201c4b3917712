import { rowOf, type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';
import { type FileBytes, sizeOf } from './byte-source.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

/** The alist layout of D. J. C. MacKay's collection of sparse codes: `N M` (columns, then rows); largest column and row
 *  weight; the N column weights; the M row weights; N lists of rows, one a column; M lists of columns, one a row; all
 *  counted from 1, short lists padded with 0. */
export function writeAlist(H: SparseMatrix): Uint8Array {
  const columns = transpose(H);
  const out = new TextWriter();
  out.number(H.cols).text(' ').number(H.rows).text('\n');
  out.number(largestWeight(columns)).text(' ').number(largestWeight(H)).text('\n');
  writeWeights(out, columns);
  writeWeights(out, H);
  writeLists(out, columns, largestWeight(columns));
  writeLists(out, H, largestWeight(H));
  return out.finish();
}

/** Reads padded and unpadded files, and files whose first line names rows before columns when the weights tell.
 *  @throws FormatError with line and column; @throws LimitError on a size that passes matrixLimits. */
export function readAlist(file: FileBytes): SparseMatrix {
  const scan = new TextScanner(file);
  const sizes: [number, number] = [scan.number('the number of columns N'), scan.number('the number of rows M', false)];
  refuseBeyondLimits(sizes[1], sizes[0], 0);
  if (sizes[0] === 0 || sizes[1] === 0) throw scan.error('at least one row and one column', '0');
  const most: [number, number] = [
    scan.number('the largest column weight'),
    scan.number('the largest row weight', false),
  ];
  const begun = lineOfWeights(scan, Math.max(...sizes));
  // Some writers name rows first. The line of column weights tells, unless the matrix is square.
  if (begun.length !== sizes[0] && begun.length === sizes[1]) {
    sizes.reverse();
    most.reverse();
  }
  const [cols, rows] = sizes;
  const [maxColumnWeight, maxRowWeight] = most;
  const columnWeights = readWeights(scan, cols, maxColumnWeight, rows, 'column', begun);
  const rowWeights = readWeights(scan, rows, maxRowWeight, cols, 'row');
  const ones = sum(columnWeights);
  if (ones !== sum(rowWeights))
    throw scan.error(`row weights that sum to ${ones}, as the column weights do`, String(sum(rowWeights)));
  refuseBeyondLimits(rows, cols, ones);
  if (4 * ones > sizeOf(file)) throw scan.error('as many ones as the file has room for', String(ones));
  const matrix = transpose(readColumns(scan, columnWeights, maxColumnWeight, rows));
  compareRows(scan, matrix, rowWeights, maxRowWeight);
  if (!scan.atEnd()) throw scan.error('the end of the file', scan.tokenAt());
  return matrix;
}

function largestWeight(M: SparseMatrix): number {
  let most = 0;
  for (let i = 0; i < M.rows; i++) most = Math.max(most, M.rowStart[i + 1]! - M.rowStart[i]!);
  return most;
}

function writeWeights(out: TextWriter, M: SparseMatrix): void {
  for (let i = 0; i < M.rows; i++) {
    if (i > 0) out.text(' ');
    out.number(M.rowStart[i + 1]! - M.rowStart[i]!);
  }
  out.text('\n');
}

function writeLists(out: TextWriter, M: SparseMatrix, width: number): void {
  for (let i = 0; i < M.rows; i++) {
    const from = M.rowStart[i]!;
    const weight = M.rowStart[i + 1]! - from;
    for (let j = 0; j < width; j++) {
      if (j > 0) out.text(' ');
      out.number(j < weight ? M.colIndex[from + j]! + 1 : 0);
    }
    out.text('\n');
  }
}

/** The weights on the next line that is not empty. */
function lineOfWeights(scan: TextScanner, atMost: number): number[] {
  const weights: number[] = [];
  if (scan.atEnd()) throw scan.error('the weights of the columns', 'the end of the file');
  while (!scan.atLineEnd() && weights.length < atMost)
    weights.push(scan.number(`the weight of column ${weights.length + 1}`, false));
  return weights;
}

/** Weights, some of which may have been read already; they may go on over several lines. */
function readWeights(
  scan: TextScanner,
  count: number,
  most: number,
  limit: number,
  what: string,
  begun: readonly number[] = [],
): Uint32Array {
  if (begun.length > count) throw scan.error(`${count} weights of ${what}s`, `${begun.length} or more`);
  const weights = new Uint32Array(count);
  for (let i = 0; i < count; i++) {
    const weight = begun[i] ?? scan.number(`the weight of ${what} ${i + 1}`);
    if (weight > most || weight > limit)
      throw scan.error(`a weight of at most ${Math.min(most, limit)} for ${what} ${i + 1}`, String(weight));
    weights[i] = weight;
  }
  return weights;
}

/** The columns as rows of a matrix. */
function readColumns(scan: TextScanner, weights: Uint32Array, width: number, limit: number): SparseMatrix {
  const rowStart = new Uint32Array(weights.length + 1);
  for (let i = 0; i < weights.length; i++) rowStart[i + 1] = rowStart[i]! + weights[i]!;
  const colIndex = new Uint32Array(rowStart[weights.length]!);
  for (let i = 0; i < weights.length; i++)
    readList(scan, colIndex.subarray(rowStart[i], rowStart[i + 1]), width, limit, 'column', i);
  return { rows: weights.length, cols: limit, rowStart, colIndex };
}

/** Reads the row lists, which say again what the column lists said, and holds them against the matrix one by one. */
function compareRows(scan: TextScanner, H: SparseMatrix, weights: Uint32Array, width: number): void {
  const scratch = new Uint32Array(Math.min(width, H.cols));
  for (let i = 0; i < H.rows; i++) {
    const entries = scratch.subarray(0, weights[i]!);
    readList(scan, entries, width, H.cols, 'row', i);
    const row = rowOf(H, i);
    if (row.length !== entries.length || row.some((column, j) => column !== entries[j]))
      throw scan.error('row lists that say the same ones as the column lists', `others in row ${i + 1}`);
  }
}

/** One list a line, which holds exactly the weight's entries, or as many more zeros as pad it to the largest weight. */
function readList(
  scan: TextScanner,
  entries: Uint32Array,
  width: number,
  limit: number,
  what: string,
  i: number,
): void {
  if (entries.length > 0) scan.atEnd();
  else scan.nextLineIfAtEnd();
  const anEntry = `one of ${entries.length} entries of ${what} ${i + 1}, from 1 to ${limit}`;
  for (let j = 0; j < entries.length; j++) {
    const entry = scan.number(anEntry, false);
    if (entry < 1 || entry > limit)
      throw scan.error(`an index from 1 to ${limit} in ${what} ${i + 1}; indices count from 1`, String(entry));
    entries[j] = entry - 1;
  }
  for (let pad = entries.length; !scan.atLineEnd(); pad++) {
    const entry = scan.number('padding with 0', false);
    if (entry !== 0 || pad >= width)
      throw scan.error(`${entries.length} entries in ${what} ${i + 1}, then zeros up to ${width}`, String(entry));
  }
  entries.sort();
  for (let j = 1; j < entries.length; j++)
    if (entries[j] === entries[j - 1])
      throw scan.error(`distinct indices in ${what} ${i + 1}`, `${entries[j]! + 1} twice`);
}

const sum = (weights: Uint32Array) => weights.reduce((total, w) => total + w, 0);

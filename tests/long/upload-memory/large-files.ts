// Files near the limit of an upload, one a format, written piece by piece since most are larger than a test should hold.
import { Zip, ZipDeflate, ZipPassThrough, Zlib } from 'fflate';
import { headerChecksum } from '../../../src/core/formats/c-header.ts';
import { encodeNpy } from '../../../src/core/formats/npy.ts';

export interface Large {
  what: string;
  name: string;
  ones: number;
  /** Less than 180 MB where the format says the most that a matrix may hold in fewer bytes. */
  leastBytes?: number;
  parts(): Iterable<Uint8Array | string>;
}

/** A matrix given by its rows: `perRow` ones, spread by a step that is prime to the columns, ascending. */
interface Shape {
  rows: number;
  cols: number;
  perRow: number;
}

const STEP = 7919;

/** Columns of one row: a run of every second column from a place that moves with the row. */
function rowOf({ cols, perRow }: Shape, row: number): number[] {
  const first = (row * STEP) % cols;
  const columns = Array.from({ length: perRow }, (_, e) => (first + 2 * e) % cols);
  return columns.sort((a, b) => a - b);
}

function* rowsText(shape: Shape, lineOf: (columns: number[], row: number) => string) {
  for (let row = 0; row < shape.rows; row++) yield lineOf(rowOf(shape, row), row);
}

const onesOf = ({ rows, perRow }: Shape) => rows * perRow;

/** Pairs of five digits each. */
const wide: Shape = { rows: 40_000, cols: 65_793, perRow: 430 };
/** Pairs of four digits each, of which more fit. */
const dense: Shape = { rows: 9_000, cols: 9_001, perRow: 2_200 };
/** As many ones as a matrix may hold, in columns of three digits. */
const most: Shape = { rows: 50_000, cols: 1_001, perRow: 999 };
/** Five bytes a one. */
const stored: Shape = { rows: 40_000, cols: 65_793, perRow: 990 };
/** Twelve bytes a one. */
const doubles: Shape = { rows: 40_000, cols: 65_793, perRow: 410 };
const packed: Shape = { rows: 50_000, cols: 65_793, perRow: 999 };

const pairs = (shape: Shape, base: number, between: string) =>
  rowsText(shape, (columns, row) => columns.map((c) => `${row + base}${between}${c + base}\n`).join(''));

function* matrixMarket(shape: Shape) {
  yield `%%MatrixMarket matrix coordinate pattern general\n${shape.rows} ${shape.cols} ${onesOf(shape)}\n`;
  yield* pairs(shape, 1, ' ');
}

function* csv(shape: Shape) {
  yield `# rows=${shape.rows} columns=${shape.cols} counted-from=0\nrow,column\n`;
  yield* pairs(shape, 0, ',');
}

/** The matrix by columns, held as 16-bit rows. */
function columnsOf(shape: Shape): Uint16Array[] {
  const weights = new Uint32Array(shape.cols);
  for (let row = 0; row < shape.rows; row++) for (const c of rowOf(shape, row)) weights[c]!++;
  const columns = Array.from(weights, (weight) => new Uint16Array(weight));
  weights.fill(0);
  for (let row = 0; row < shape.rows; row++) for (const c of rowOf(shape, row)) columns[c]![weights[c]!++] = row;
  return columns;
}

function* alist(shape: Shape) {
  const columns = columnsOf(shape);
  const weights = columns.map((rows) => rows.length);
  yield `${shape.cols} ${shape.rows}\n${Math.max(...weights)} ${shape.perRow}\n${weights.join(' ')}\n`;
  yield `${Array(shape.rows).fill(shape.perRow).join(' ')}\n`;
  for (const rows of columns) yield `${Array.from(rows, (r) => r + 1).join(' ')}\n`;
  yield* rowsText(shape, (row) => `${row.map((c) => c + 1).join(' ')}\n`);
}

function* json(shape: Shape) {
  yield `{"rows": ${shape.rows}, "onesByRow": [\n`;
  yield* rowsText(shape, (columns, row) => `${row > 0 ? ',' : ''}[${columns.join(',')}]\n`);
  yield `], "columns": ${shape.cols}}\n`;
}

function* blockList(shape: Shape) {
  yield `# points=${shape.cols} blocks=${shape.rows} counted-from=0\n`;
  yield* rowsText(shape, (columns) => `${columns.join(' ')}\n`);
}

function* blockListJson(shape: Shape) {
  yield '{"blocks": [\n';
  yield* rowsText(shape, (columns, row) => `${row > 0 ? ',' : ''}[${columns.join(',')}]\n`);
  yield `], "points": ${shape.cols}}\n`;
}

function* cHeader(shape: Shape) {
  const rowStart = Uint32Array.from({ length: shape.rows + 1 }, (_, i) => i * shape.perRow);
  const colIndex = new Uint32Array(onesOf(shape));
  for (let row = 0; row < shape.rows; row++) colIndex.set(rowOf(shape, row), row * shape.perRow);
  const sum = headerChecksum({ rows: shape.rows, cols: shape.cols, rowStart, colIndex });
  yield `#define H_ROWS ${shape.rows}u\n#define H_COLS ${shape.cols}u\n#define H_ONES ${onesOf(shape)}u\n`;
  yield `#define H_CHECKSUM ${sum}u\nstatic const uint32_t H_ROW_START[H_ROWS + 1] = {\n${rowStart.join(',')}};\n`;
  yield 'static const uint32_t H_COL_INDEX[H_ONES ? H_ONES : 1] = {\n';
  yield* rowsText(shape, (columns, row) => `${row > 0 ? ',\n' : ''}${columns.join(',')}`);
  yield '\n};\n';
}

/** Blocks of 2 × 2, each with a shift or none. */
function* shifts(blockRows: number, blockCols: number, every: number) {
  yield `z=2 block-rows=${blockRows} block-columns=${blockCols}\n`;
  for (let i = 0; i < blockRows; i++)
    yield `${Array.from({ length: blockCols }, (_, j) => (j % every === 0 ? (i + j) & 1 : -1)).join(' ')}\n`;
}

const ints = (values: ArrayLike<number>) => new Uint8Array(Int32Array.from(values).buffer);

/** One member of an archive or one part of an array: its size, then its bytes in pieces. */
interface Pieces {
  size: number;
  parts(): Iterable<Uint8Array>;
}

function rowPieces(shape: Shape): Pieces {
  return {
    size: 4 * onesOf(shape),
    *parts() {
      for (let row = 0; row < shape.rows; row++) yield ints(rowOf(shape, row));
    },
  };
}

function filled(count: number, piece: Uint8Array): Pieces {
  return {
    size: count * piece.length,
    *parts() {
      const most = 1 << 14;
      const many = new Uint8Array(most * piece.length);
      for (let i = 0; i < most; i++) many.set(piece, i * piece.length);
      for (let left = count; left > 0; left -= most) yield many.subarray(0, Math.min(left, most) * piece.length);
    },
  };
}

const whole = (bytes: Uint8Array): Pieces => ({ size: bytes.length, parts: () => [bytes] });

function npyOf(descr: string, shape: number[], data: Pieces): Pieces {
  const head = encodeNpy({ shape, descr, fortranOrder: false, data: new Uint8Array() });
  return {
    size: head.length + data.size,
    *parts() {
      yield head;
      yield* data.parts();
    },
  };
}

function* npz(kind: string, shape: Shape, level: 0 | 1, sizes: [number, number]) {
  const ones = onesOf(shape);
  const lines = shape.rows;
  const members: [string, Pieces][] = [
    ['indices', npyOf('<i4', [ones], rowPieces(shape))],
    ['indptr', npyOf('<i4', [lines + 1], whole(ints(Array.from({ length: lines + 1 }, (_, i) => i * shape.perRow))))],
    ['format', npyOf('|S3', [], whole(new TextEncoder().encode(kind)))],
    ['shape', npyOf('<i4', [2], whole(ints(sizes)))],
    ['data', npyOf('|i1', [ones], filled(ones, Uint8Array.of(1)))],
  ];
  let ready: Uint8Array[] = [];
  const zip = new Zip((error, bytes) => {
    if (error) throw error;
    ready.push(bytes);
  });
  for (const [name, { parts }] of members) {
    const member =
      level === 0 || name === 'format' ? new ZipPassThrough(`${name}.npy`) : new ZipDeflate(`${name}.npy`, { level });
    zip.add(member);
    for (const part of parts()) {
      member.push(part.slice());
      yield* ready;
      ready = [];
    }
    member.push(new Uint8Array(), true);
    yield* ready;
    ready = [];
  }
  zip.end();
  yield* ready;
}

/** A sparse array whose columns are the rows of the shape. */
function* matArray(shape: Shape, valueType: number, value: Uint8Array): Generator<Uint8Array> {
  const ones = onesOf(shape);
  const parts: [number, Pieces][] = [
    [6, whole(ints([5, ones]))],
    [5, whole(ints([shape.cols, shape.rows]))],
    [1, whole(new TextEncoder().encode('H'))],
    [5, rowPieces(shape)],
    [5, whole(ints(Array.from({ length: shape.rows + 1 }, (_, i) => i * shape.perRow)))],
    [valueType, filled(ones, value)],
  ];
  const padded = (size: number) => 8 * Math.ceil(size / 8);
  yield ints([14, parts.reduce((sum, [, { size }]) => sum + 8 + padded(size), 0)]);
  for (const [type, pieces] of parts) {
    yield ints([type, pieces.size]);
    yield* pieces.parts();
    yield new Uint8Array(padded(pieces.size) - pieces.size);
  }
}

function matHead(): Uint8Array {
  const head = new Uint8Array(128).fill(32);
  head.set([0, 1, 0x49, 0x4d], 124);
  return head;
}

function* mat(shape: Shape, valueType: number, value: Uint8Array) {
  yield matHead();
  yield* matArray(shape, valueType, value);
}

function* packedMat(shape: Shape, valueType: number, value: Uint8Array) {
  yield matHead();
  const packed: Uint8Array[] = [];
  const zlib = new Zlib({ level: 1 }, (piece) => {
    packed.push(piece.slice());
  });
  for (const part of matArray(shape, valueType, value)) zlib.push(part.slice());
  zlib.push(new Uint8Array(), true);
  yield ints([15, packed.reduce((sum, piece) => sum + piece.length, 0)]);
  yield* packed;
}

const one = new Uint8Array(Float64Array.of(1).buffer);
const bytes1 = Uint8Array.of(1);

function* npyCells(rows: number, cols: number, every: number) {
  yield encodeNpy({ shape: [rows, cols], descr: '|u1', fortranOrder: false, data: new Uint8Array() });
  for (let row = 0; row < rows; row++)
    yield Uint8Array.from({ length: cols }, (_, c) => Number((c + row) % every === 0));
}

const large = (what: string, name: string, shape: Shape, parts: Large['parts'], leastBytes?: number): Large => ({
  what,
  name,
  ones: onesOf(shape),
  parts,
  ...(leastBytes !== undefined && { leastBytes }),
});

export const largeFiles: readonly Large[] = [
  large('a Matrix Market file', 'wide.mtx', wide, () => matrixMarket(wide)),
  large('a Matrix Market file of more ones', 'dense.mtx', dense, () => matrixMarket(dense)),
  large('a CSV file', 'wide.csv', wide, () => csv(wide)),
  large('a CSV file of more ones', 'dense.csv', dense, () => csv(dense)),
  large('an alist', 'dense.alist', dense, () => alist(dense)),
  large('JSON whose number of columns comes last', 'most.json', most, () => json(most)),
  large('a C header', 'most.h', most, () => cHeader(most)),
  {
    what: 'a quasi-cyclic shift table',
    name: 'most.qc.txt',
    ones: 2 * 8_600 * Math.ceil(8_600 / 3),
    parts: () => shifts(8_600, 8_600, 3),
  },
  large('a block list', 'most.txt', most, () => blockList(most)),
  large('a block list as JSON', 'most-blocks.json', most, () => blockListJson(most)),
  { what: 'a dense .npy', name: 'cells.npy', ones: 14_000 * 3_500, parts: () => npyCells(14_000, 14_000, 4) },
  large('a stored .npz by rows', 'rows.npz', stored, () => npz('csr', stored, 0, [stored.rows, stored.cols])),
  large('a stored .npz by columns', 'columns.npz', stored, () => npz('csc', stored, 0, [stored.cols, stored.rows])),
  large(
    'a deflated .npz by columns',
    'packed.npz',
    packed,
    () => npz('csc', packed, 1, [packed.cols, packed.rows]),
    1e7,
  ),
  large('a .mat of doubles', 'doubles.mat', doubles, () => mat(doubles, 9, one)),
  large('a .mat of bytes', 'bytes.mat', stored, () => mat(stored, 2, bytes1)),
  large('a compressed .mat', 'packed.mat', packed, () => packedMat(packed, 9, one), 1e7),
];

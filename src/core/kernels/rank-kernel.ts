/** Elimination over GF(2) by the method of four Russians (Arlazarov, Dinic, Kronrod and Faradžev 1970; with Gray tables as
 *  in Albrecht, Bard and Hart, ACM TOMS 37, 2010). The matrix lies in panels of 512 columns, each with the pieces of all
 *  rows one after another, so that the tables of one panel stay in the nearest cache while its rows stream by. A strip is
 *  32 columns, and its pivot rows are summed in tables, one for a few bits of the strip each. */

import { type Expr, i32, type Local, ModuleBuilder, v128, when, whileLoop } from './assembler/index.ts';

export const STRIP_COLUMNS = 32;
/** Bytes of a row in one panel. */
export const PANEL_BYTES = 64;
/** Bits of the strip that each table takes, from the lowest on. */
const TABLE_BITS = [7, 7, 6, 6, 6];
const UNROLLED = Array.from({ length: PANEL_BYTES / 16 }, (_, i) => 16 * i);

const TABLES = TABLE_BITS.map((bits, t) => ({
  bits,
  shift: TABLE_BITS.slice(0, t).reduce((sum, b) => sum + b, 0),
  start: TABLE_BITS.slice(0, t).reduce((sum, b) => sum + (PANEL_BYTES << b), 0),
}));

/** Where the pivot row of each bit of the strip is named: its byte offset within a panel, or −1 for a bit without one. */
export const PIVOT_ROWS_AT = TABLE_BITS.reduce((sum, b) => sum + (PANEL_BYTES << b), 0);
/** Where the matrix begins, on a page of its own. */
export const MATRIX_AT = 65536 * Math.ceil((PIVOT_ROWS_AT + 4 * STRIP_COLUMNS) / 65536);

/** Functions of the module; addresses and sizes are in bytes. A row is named by the address of its piece in some panel;
 *  `panelBytes` leads from there to the next panel. */
export interface RankKernel {
  memory: WebAssembly.Memory;
  /** Adds the row at `source` to that at `target`, over so many panels. */
  addRow(target: number, source: number, panels: number, panelBytes: number): void;
  /** Exchanges two rows over so many panels. */
  swapRows(a: number, b: number, panels: number, panelBytes: number): void;
  /** Fills the tables with the sums of the pivot rows in the panel at `panel`. Entries of bits without a pivot row hold
   *  anything; no row may ask for them. */
  buildTables(panel: number): void;
  /** Adds to each row piece in [first, end) the table entries named by its word among `windows`, one word every
   *  PANEL_BYTES, with the bits outside the mask taken for zero. */
  applyTables(first: number, end: number, windows: number, mask: number): void;
}

let compiled: WebAssembly.Module | undefined;
let kept: RankKernel | undefined;
/** A memory up to this size is kept for the next matrix, which spares the operating system handing out fresh pages. */
const KEPT_PAGES = 1024;

/** Runs the task on a kernel whose memory reaches `end`, the matrix's part all zero. The module is emitted and compiled
 *  once, in well under a millisecond. */
export function withRankKernel<T>(end: number, task: (kernel: RankKernel) => T): T {
  const pages = Math.ceil(end / 65536);
  const kernel = kept ?? freshKernel();
  kept = undefined;
  const present = kernel.memory.buffer.byteLength / 65536;
  new Uint8Array(kernel.memory.buffer).fill(0, MATRIX_AT, Math.min(end, present * 65536));
  if (pages > present) kernel.memory.grow(pages - present);
  const result = task(kernel);
  if (pages <= KEPT_PAGES) kept = kernel;
  return result;
}

function freshKernel(): RankKernel {
  compiled ??= new WebAssembly.Module(emit());
  return new WebAssembly.Instance(compiled).exports as unknown as RankKernel;
}

function emit(): Uint8Array<ArrayBuffer> {
  const m = new ModuleBuilder();
  m.memory('memory', MATRIX_AT / 65536);
  emitAddRow(m);
  emitSwapRows(m);
  emitBuildTables(m);
  emitApplyTables(m);
  return m.bytes();
}

function emitAddRow(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [target, source, panels, panelBytes] = [0, 1, 2, 3].map((i) => f.param(i, 'i32')) as Four;
      f.emit(
        whileLoop(panels, [
          ...UNROLLED.map((at) => v128.store(target, v128.xor(v128.load(target, at), v128.load(source, at)), at)),
          target.set(i32.add(target, panelBytes)),
          source.set(i32.add(source, panelBytes)),
          panels.set(i32.sub(panels, 1)),
        ]),
      );
    },
    'addRow',
  );
}

function emitSwapRows(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [a, b, panels, panelBytes] = [0, 1, 2, 3].map((i) => f.param(i, 'i32')) as Four;
      const held = f.local('v128');
      f.emit(
        whileLoop(panels, [
          ...UNROLLED.flatMap((at) => [
            held.set(v128.load(a, at)),
            v128.store(a, v128.load(b, at), at),
            v128.store(b, held, at),
          ]),
          a.set(i32.add(a, panelBytes)),
          b.set(i32.add(b, panelBytes)),
          panels.set(i32.sub(panels, 1)),
        ]),
      );
    },
    'swapRows',
  );
}

function emitBuildTables(m: ModuleBuilder): void {
  m.func(
    { params: ['i32'], results: [] },
    (f) => {
      const panel = f.param(0, 'i32');
      const source = f.local('i32');
      const entry = f.local('i32');
      const row = UNROLLED.map(() => f.local('v128'));
      /** Entries [half, 2·half) of the table: entries [0, half) plus the pivot row of the bit; entry 0 stays zero. */
      const doubled = (start: number, half: number, bit: number) => [
        source.set(i32.load(i32.of(PIVOT_ROWS_AT), 4 * bit)),
        when(i32.ne(source, -1), [
          source.set(i32.add(source, panel)),
          ...UNROLLED.map((at, i) => row[i]!.set(v128.load(source, at))),
          entry.set(0),
          whileLoop(i32.ltU(entry, half * PANEL_BYTES), [
            ...UNROLLED.map((at, i) =>
              v128.store(entry, v128.xor(v128.load(entry, start + at), row[i]!), start + half * PANEL_BYTES + at),
            ),
            entry.set(i32.add(entry, PANEL_BYTES)),
          ]),
        ]),
      ];
      f.emit(
        ...TABLES.flatMap(({ bits, shift, start }) =>
          Array.from({ length: bits }, (_, b) => doubled(start, 1 << b, shift + b)).flat(),
        ),
      );
    },
    'buildTables',
  );
}

function emitApplyTables(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [row, end, windows, mask] = [0, 1, 2, 3].map((i) => f.param(i, 'i32')) as Four;
      const word = f.local('i32');
      const entries = TABLES.map(() => f.local('i32'));
      const entryOf = ({ bits, shift }: (typeof TABLES)[number]) =>
        i32.mul(i32.and(i32.shrU(word, shift), (1 << bits) - 1), PANEL_BYTES);
      const sumAt = (at: number) =>
        TABLES.reduce<Expr<'v128'>>(
          (sum, { start }, t) => v128.xor(sum, v128.load(entries[t]!, start + at)),
          v128.load(row, at),
        );
      f.emit(
        whileLoop(i32.ltU(row, end), [
          word.set(i32.and(i32.load(windows), mask)),
          when(word, [
            ...entries.map((entry, t) => entry.set(entryOf(TABLES[t]!))),
            ...UNROLLED.map((at) => v128.store(row, sumAt(at), at)),
          ]),
          windows.set(i32.add(windows, PANEL_BYTES)),
          row.set(i32.add(row, PANEL_BYTES)),
        ]),
      );
    },
    'applyTables',
  );
}

type Four = [Local<'i32'>, Local<'i32'>, Local<'i32'>, Local<'i32'>];

/** The inner loops of elimination over GF(2) by the method of four Russians (Arlazarov, Dinic, Kronrod and Faradžev 1970;
 *  with Gray tables as in Albrecht, Bard and Hart, ACM TOMS 37, 2010). A strip is 32
 *  columns, and its pivot rows are summed in four tables of 256 entries, one a byte of the strip. */

import { type Expr, i32, type Local, ModuleBuilder, v128, when, whileLoop } from './assembler/index.ts';

export const STRIP_COLUMNS = 32;
export const TABLES = 4;
const TABLE_BITS = 8;
export const TABLE_ENTRIES = 1 << TABLE_BITS;
/** Rows, and the byte ranges given to the functions, are multiples of this many bytes. */
export const ROW_ALIGNMENT = 64;
const UNROLLED = [0, 16, 32, 48];

/** Functions of the module; addresses and sizes are in bytes. */
export interface RankKernel {
  memory: WebAssembly.Memory;
  /** Adds the row at `source` to that at `target`, over bytes [from, to). */
  addRow(target: number, source: number, from: number, to: number): void;
  /** Exchanges two rows over bytes [from, to). */
  swapRows(a: number, b: number, from: number, to: number): void;
  /** Fills table entries [half, 2·half), each a row, with entries [0, half) plus the row at `source`, from byte `from` on. */
  doubleTable(table: number, rowBytes: number, half: number, source: number, from: number): void;
  /** Adds to each row in [first, end) the four table entries named by the bytes of its word in `windows`, one word a row,
   *  from byte `from` on. Entry e of table t is the row at tables + (256·t + e)·rowBytes. */
  applyTables(first: number, end: number, rowBytes: number, windows: number, tables: number, from: number): void;
}

let compiled: WebAssembly.Module | undefined;

/** A fresh instance with `pages` × 64 KiB of memory. The module is emitted and compiled once, in well under a
 *  millisecond. */
export function rankKernel(pages: number): RankKernel {
  compiled ??= new WebAssembly.Module(emit());
  const { exports } = new WebAssembly.Instance(compiled);
  const kernel = exports as unknown as RankKernel;
  if (pages > 1) kernel.memory.grow(pages - 1);
  return kernel;
}

function emit(): Uint8Array<ArrayBuffer> {
  const m = new ModuleBuilder();
  m.memory('memory', 1);
  emitAddRow(m);
  emitSwapRows(m);
  emitDoubleTable(m);
  emitApplyTables(m);
  return m.bytes();
}

/** Runs the body for each piece of a row in [from, to). */
function along(offset: Local<'i32'>, from: Expr<'i32'>, to: Expr<'i32'>, body: Parameters<typeof whileLoop>[1]) {
  return [offset.set(from), whileLoop(i32.ltU(offset, to), [...body, offset.set(i32.add(offset, ROW_ALIGNMENT))])];
}

function emitAddRow(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [target, source, from, to] = [0, 1, 2, 3].map((i) => f.param(i, 'i32')) as Four;
      const o = f.local('i32');
      const at = (row: Local<'i32'>) => i32.add(row, o);
      f.emit(
        ...along(
          o,
          from,
          to,
          UNROLLED.map((step) =>
            v128.store(at(target), v128.xor(v128.load(at(target), step), v128.load(at(source), step)), step),
          ),
        ),
      );
    },
    'addRow',
  );
}

function emitSwapRows(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [a, b, from, to] = [0, 1, 2, 3].map((i) => f.param(i, 'i32')) as Four;
      const o = f.local('i32');
      const held = f.local('v128');
      const at = (row: Local<'i32'>) => i32.add(row, o);
      f.emit(
        ...along(
          o,
          from,
          to,
          UNROLLED.flatMap((step) => [
            held.set(v128.load(at(a), step)),
            v128.store(at(a), v128.load(at(b), step), step),
            v128.store(at(b), held, step),
          ]),
        ),
      );
    },
    'swapRows',
  );
}

function emitDoubleTable(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [table, rowBytes, half, source, from] = [0, 1, 2, 3, 4].map((i) => f.param(i, 'i32')) as Five;
      const entry = f.local('i32');
      const end = f.local('i32');
      const jump = f.local('i32');
      const o = f.local('i32');
      f.emit(
        jump.set(i32.mul(half, rowBytes)),
        entry.set(table),
        end.set(i32.add(table, jump)),
        whileLoop(i32.ltU(entry, end), [
          ...along(
            o,
            from,
            rowBytes,
            UNROLLED.map((step) =>
              v128.store(
                i32.add(i32.add(entry, jump), o),
                v128.xor(v128.load(i32.add(entry, o), step), v128.load(i32.add(source, o), step)),
                step,
              ),
            ),
          ),
          entry.set(i32.add(entry, rowBytes)),
        ]),
      );
    },
    'doubleTable',
  );
}

function emitApplyTables(m: ModuleBuilder): void {
  m.func(
    { params: ['i32', 'i32', 'i32', 'i32', 'i32', 'i32'], results: [] },
    (f) => {
      const [row, end, rowBytes, windows, tables, from] = [0, 1, 2, 3, 4, 5].map((i) => f.param(i, 'i32')) as Six;
      const word = f.local('i32');
      const o = f.local('i32');
      const entries = Array.from({ length: TABLES }, () => f.local('i32'));
      const entryOf = (t: number) =>
        i32.add(
          tables,
          i32.mul(i32.add(t * TABLE_ENTRIES, i32.and(i32.shrU(word, t * TABLE_BITS), TABLE_ENTRIES - 1)), rowBytes),
        );
      const sumAt = (step: number) =>
        entries.reduce<Expr<'v128'>>(
          (sum, entry) => v128.xor(sum, v128.load(i32.add(entry, o), step)),
          v128.load(i32.add(row, o), step),
        );
      f.emit(
        whileLoop(i32.ltU(row, end), [
          word.set(i32.load(windows)),
          when(word, [
            ...entries.map((entry, t) => entry.set(entryOf(t))),
            ...along(
              o,
              from,
              rowBytes,
              UNROLLED.map((step) => v128.store(i32.add(row, o), sumAt(step), step)),
            ),
          ]),
          windows.set(i32.add(windows, 4)),
          row.set(i32.add(row, rowBytes)),
        ]),
      );
    },
    'applyTables',
  );
}

type Four = [Local<'i32'>, Local<'i32'>, Local<'i32'>, Local<'i32'>];
type Five = [...Four, Local<'i32'>];
type Six = [...Five, Local<'i32'>];

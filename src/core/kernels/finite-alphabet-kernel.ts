/** Finite-alphabet decoding of column weight 3 (Planjery, Declercq, Danjean and Vasić, IEEE Trans. Commun. 61, 2013),
 *  128 frames a word. A message from −3 to 3 is four bits: its sign, and whether its magnitude is at least 1, 2, 3. The
 *  table of the bits becomes and/or code, whatever it is; for a received 1 messages are negated on the way in and out,
 *  which the table's symmetry Φ(−y, −a, −b) = −Φ(y, a, b) allows. */

import type { BitTable } from '../decoders/finite-alphabet.ts';
import { addPlanes } from './adder-network.ts';
import {
  type FunctionBuilder,
  type FunctionRef,
  i32,
  type Local,
  ModuleBuilder,
  type Statement,
  type V128,
  v128,
} from './assembler/index.ts';
import { emitClear, emitFilled, emitSyndrome, mask } from './bit-words.ts';
import { eachVector, emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { columnTables, type Place, rowEdgeTables, rowTables, type SideTables, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { bitLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { at, put } from './votes.ts';
import { emitWeighing } from './weighing.ts';

const nothing = { params: [], results: [] } as const;
const refillAt = 40;
const levels = [-3, -2, -1, 0, 1, 2, 3];
const magnitudes = [1, 2, 3] as const;

interface Arrays {
  word: number;
  syndrome: number;
  received: number;
  /** Messages an edge, numbered by columns: to the checks, and in their place to the bits. */
  sign: number;
  /** Whether the magnitude is at least 1, 2, 3. */
  reach: readonly [number, number, number];
}

/** @param given Of column weight 3.
 *  @param table Symmetric in its two messages; row and column m + 3 for message m, received 0. */
export function finiteAlphabetKernel(given: GraphPlan, table: BitTable, cap: number): KernelImage {
  const plan = { ...given, circulant: null };
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, cap);
  const perEdge = () => layout.reserve(vectorBytes * H.colIndex.length);
  const arrays: Arrays = {
    word: layout.reserve(vectorBytes * H.cols),
    syndrome: layout.reserve(vectorBytes * H.rows),
    received: layout.reserve(vectorBytes * H.cols),
    sign: perEdge(),
    reach: [perEdge(), perEdge(), perEdge()],
  };
  const rows = rowTables(plan, layout);
  const rowEdges = rowEdgeTables(plan, layout);
  const columns = columnTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const m = new ModuleBuilder();
  const spread = emitFilled(m, plan, arrays.word, [{ array: arrays.received, twice: false }]);
  emitConductor(m, places, {
    lanes: 128,
    refillAt,
    cap,
    positions: positions.space,
    word: bitLanes(arrays.word),
    clear: emitClear(m, H.cols, arrays.word),
    filled: emitFirstMessages(m, H.cols, arrays, spread, table[3]![3]!),
    syndrome: emitSyndrome(m, plan, rows, arrays),
    iterate: emitIterate(m, rowEdges, columns, arrays, table),
    ...emitWeighing(m, layout, H.cols, arrays.word),
  });
  const tables = [rows, rowEdges, columns, positions];
  const stepNs = 8 * H.colIndex.length;
  return finishKernel(m, layout, { n: H.cols, cap, places, word: arrays.word, stepNs, tables });
}

/** Fresh lanes send the table's message at 0, 0 on all edges. */
function emitFirstMessages(
  m: ModuleBuilder,
  n: number,
  arrays: Arrays,
  spread: FunctionRef,
  first: number,
): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const edge = f.local('i32');
    const fresh = f.local('v128');
    const received = v128.load(i, arrays.received);
    const sign = first === 0 ? v128.zero : first < 0 ? v128.not(received) : received;
    const take = (array: number, value: V128): Statement[] =>
      [0, 1, 2].map((t) => {
        const offset = array + vectorBytes * t;
        return v128.store(edge, v128.bitselect(value, v128.load(edge, offset), fresh), offset);
      });
    f.emit(
      spread.call(),
      fresh.set(mask(control.fresh)),
      edge.set(0),
      eachVector(i, n, [
        ...take(arrays.sign, sign),
        ...magnitudes.flatMap((k) => take(arrays.reach[k - 1]!, Math.abs(first) >= k ? v128.ones : v128.zero)),
        edge.set(i32.add(edge, 3 * vectorBytes)),
      ]),
    );
  });
}

function emitIterate(
  m: ModuleBuilder,
  rowEdges: SideTables,
  columns: SideTables,
  arrays: Arrays,
  table: BitTable,
): FunctionRef {
  return m.func(nothing, (f) => {
    f.emit(checkPass(f, rowEdges, arrays), bitPass(f, columns, arrays, table));
  });
}

/** The others' magnitudes are all at least k when no edge falls short of k, or the edge itself is the only one. */
function checkPass(f: FunctionBuilder, rowEdges: SideTables, { sign, reach }: Arrays): Statement {
  const vector = () => f.local('v128');
  const parity = vector();
  const own = vector();
  const short = magnitudes.map(vector);
  const shortTwice = magnitudes.map(vector);
  const reached = magnitudes.map(vector);
  return walk(f, rowEdges, (check) => [
    parity.set(v128.zero),
    ...[...short, ...shortTwice].map((local) => local.set(v128.zero)),
    check.eachNeighbour((edge) => [
      parity.set(v128.xor(parity, at(edge, sign))),
      ...magnitudes.flatMap((k) => [
        own.set(v128.not(at(edge, reach[k - 1]!))),
        shortTwice[k - 1]!.set(v128.or(shortTwice[k - 1]!, v128.and(short[k - 1]!, own))),
        short[k - 1]!.set(v128.or(short[k - 1]!, own)),
      ]),
    ]),
    check.eachNeighbour((edge) => [
      ...magnitudes.flatMap((k) => {
        const alone = v128.andnot(v128.not(at(edge, reach[k - 1]!)), shortTwice[k - 1]!);
        return [
          reached[k - 1]!.set(v128.or(v128.not(short[k - 1]!), alone)),
          put(edge, reach[k - 1]!, reached[k - 1]!),
        ];
      }),
      // A message of 0 has no sign.
      put(edge, sign, v128.and(v128.xor(parity, at(edge, sign)), reached[0]!)),
    ]),
  ]);
}

/** Locals for the seven levels of a message: exactly one is set in each lane. */
type OneHot = readonly Local<'v128'>[];

function bitPass(f: FunctionBuilder, columns: SideTables, arrays: Arrays, table: BitTable): Statement {
  const vector = () => f.local('v128');
  const received = vector();
  const flip = vector();
  const out = vector();
  const messages: OneHot[] = [0, 1, 2].map(() => levels.map(vector));
  const sum = [0, 1, 2, 3, 4].map(vector);
  return walk(f, columns, (bit) => {
    const edges = bit.neighbours.map(({ edge }) => edge);
    return [
      received.set(at(bit.own, arrays.received)),
      ...messages.flatMap((levelsOf, t) => readLevels(edges[t]!, arrays, received, levelsOf)),
      ...sum.map((digit) => digit.set(v128.zero)),
      ...messages.flatMap((levelsOf) => addPlanes(f, sum, binary(levelsOf))),
      // 1 + a + b + c < 0, with each message counted from −3: a sum of at most 7.
      flip.set(v128.not(v128.or(sum[3]!, sum[4]!))),
      put(bit.own, arrays.word, v128.xor(received, flip)),
      ...edges.flatMap((edge, t) => {
        const [a, b] = messages.filter((_, s) => s !== t) as [OneHot, OneHot];
        return [
          out.set(pairs(table, (level) => Math.abs(level) >= 1, a, b)),
          put(edge, arrays.reach[0], out),
          put(
            edge,
            arrays.sign,
            v128.and(
              v128.xor(
                pairs(table, (level) => level < 0, a, b),
                received,
              ),
              out,
            ),
          ),
          put(
            edge,
            arrays.reach[1],
            pairs(table, (level) => Math.abs(level) >= 2, a, b),
          ),
          put(
            edge,
            arrays.reach[2],
            pairs(table, (level) => Math.abs(level) >= 3, a, b),
          ),
        ];
      }),
    ];
  });
}

/** The levels of an edge's message, negated where a one was received. */
function readLevels(edge: Place, { sign, reach }: Arrays, received: V128, into: OneHot): Statement[] {
  const least = (k: number): V128 => (k > 3 ? v128.zero : at(edge, reach[k - 1]!));
  const negative = v128.xor(at(edge, sign), received);
  return levels.map((level, at) => {
    const k = Math.abs(level);
    if (k === 0) return into[at]!.set(v128.not(least(1)));
    const magnitude = v128.andnot(least(k), least(k + 1));
    return into[at]!.set(level < 0 ? v128.and(magnitude, negative) : v128.andnot(magnitude, negative));
  });
}

const any = (terms: readonly V128[]): V128 => (terms.length === 0 ? v128.zero : terms.reduce((a, b) => v128.or(a, b)));

/** A message plus 3 as three binary digits. */
const binary = (levelsOf: OneHot): V128[] =>
  [0, 1, 2].map((digit) => any(levelsOf.filter((_, number) => (number >> digit) & 1)));

/** Lanes where the table's entry for two messages is of a kind: rows of the table with the same entries of that kind
 *  are taken together. */
function pairs(table: BitTable, wanted: (level: number) => boolean, a: OneHot, b: OneHot): V128 {
  const byColumns = new Map<string, { rows: V128[]; columns: V128[] }>();
  table.forEach((row, i) => {
    const columns = b.filter((_, j) => wanted(row[j]!));
    const key = row.map((level) => (wanted(level) ? 1 : 0)).join('');
    const group = byColumns.get(key) ?? { rows: [], columns };
    group.rows.push(a[i]!);
    byColumns.set(key, group);
  });
  const terms = [...byColumns.values()].filter(({ columns }) => columns.length > 0);
  return any(terms.map(({ rows, columns }) => v128.and(any(rows), any(columns))));
}

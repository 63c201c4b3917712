import { ParamError } from '../errors.ts';
import { type Decoder, iterativeDecoder } from './decoder.ts';
import type { DecoderSpec } from './decoder-spec.ts';
import type { TannerGraph } from './tanner-graph.ts';

type FiniteAlphabet = Extract<DecoderSpec, { kind: 'finite-alphabet' }>;
/** Row and column m + 3 hold the message for incoming messages of those levels, m from −3 to 3. */
export type BitTable = readonly (readonly number[])[];

/** The bit's rule of the seven-level decoder for received 0, from memory of Planjery, Declercq, Danjean and Vasić (IEEE
 *  Trans. Commun. 61, 2013, Table II, which prints it for received 1): not confirmed against the paper here. Tests hold
 *  it to the paper's two demands, symmetry and monotonicity. */
export const rememberedTable: BitTable = oppositeTable([
  [-3, -3, -3, -3, -3, -3, -1],
  [-3, -3, -3, -3, -2, -1, 1],
  [-3, -3, -2, -2, -1, -1, 1],
  [-3, -3, -2, -1, 0, 0, 1],
  [-3, -2, -1, 0, 0, 1, 2],
  [-3, -1, -1, 0, 1, 1, 3],
  [-1, 1, 1, 1, 2, 3, 3],
]);

/** The table for the other received bit: Φ(−y, −m1, −m2) = −Φ(y, m1, m2). */
export function oppositeTable(table: BitTable): number[][] {
  return table.map((row, a) => row.map((_, b) => 0 - table[6 - a]![6 - b]!));
}

/** Finite-alphabet iterative decoding of column weight 3, with seven message levels −3 … 3. Check: the parity of the
 *  others' signs (0 counts as positive) and their least magnitude. Bit: the table, of the other two checks' messages
 *  and the received bit; the first messages are the table's at 0, 0. Decision: the sign of the received bit as ±1 plus
 *  the three messages; at 0 the received bit stands.
 *  @throws ParamError on another column weight, or a table that is not symmetric in its two arguments. */
export function finiteAlphabet(graph: TannerGraph, degrees: Uint32Array, spec: FiniteAlphabet, cap: number): Decoder {
  const { H, bitStart, bitEdges } = graph;
  const other = degrees.find((d) => d !== 3);
  if (other !== undefined) throw new ParamError('H', `a column of weight ${other}`, 'a matrix of column weight 3');
  const tables = bothTables(spec.table ?? rememberedTable);
  const word = new Uint8Array(H.cols);
  const received = new Uint8Array(H.cols);
  const toCheck = new Int8Array(H.colIndex.length);
  const toBit = new Int8Array(H.colIndex.length);
  return iterativeDecoder(H, cap, {
    word,
    start(frame) {
      received.set(frame as Uint8Array);
      word.set(received);
      for (let e = 0; e < toCheck.length; e++) toCheck[e] = tables[received[H.colIndex[e]!]!]![3]![3]!;
    },
    iterate() {
      for (let i = 0; i < H.rows; i++) updateCheck(H.rowStart[i]!, H.rowStart[i + 1]!, toCheck, toBit);
      for (let j = 0; j < H.cols; j++) {
        const y = received[j]!;
        const table = tables[y]!;
        const [a, b, c] = bitEdges.subarray(bitStart[j], bitStart[j + 1]) as unknown as [number, number, number];
        const [ma, mb, mc] = [toBit[a]!, toBit[b]!, toBit[c]!];
        const total = (y === 0 ? 1 : -1) + ma + mb + mc;
        word[j] = total === 0 ? y : total < 0 ? 1 : 0;
        toCheck[a] = table[mb + 3]![mc + 3]!;
        toCheck[b] = table[ma + 3]![mc + 3]!;
        toCheck[c] = table[ma + 3]![mb + 3]!;
      }
      return true;
    },
  });
}

function bothTables(table: BitTable): [BitTable, BitTable] {
  if (table.some((row, a) => row.some((value, b) => value !== table[b]![a])))
    throw new ParamError('decoder.table', table, 'a table that is the same with its two messages exchanged');
  return [table, oppositeTable(table)];
}

function updateCheck(from: number, to: number, toCheck: Int8Array, toBit: Int8Array): void {
  let least = 3;
  let second = 3;
  let leastAt = -1;
  let parity = 0;
  for (let e = from; e < to; e++) {
    const magnitude = Math.abs(toCheck[e]!);
    if (toCheck[e]! < 0) parity ^= 1;
    if (magnitude < least || leastAt < 0) {
      second = least;
      least = magnitude;
      leastAt = e;
    } else second = Math.min(second, magnitude);
  }
  for (let e = from; e < to; e++) {
    const magnitude = e === leastAt ? second : least;
    toBit[e] = parity ^ (toCheck[e]! < 0 ? 1 : 0) ? -magnitude : magnitude;
  }
}

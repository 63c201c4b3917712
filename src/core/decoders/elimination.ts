import { type Decoder, erased, fromSteps } from './decoder.ts';
import type { TannerGraph } from './tanner-graph.ts';

/** Maximum-likelihood decoding of erasures: the checks as linear equations in the erased bits, by Gauss–Jordan
 *  elimination over GF(2). Every bit that is the same in all codewords that agree with what was received is found, and
 *  the rest stay erased. One iteration where anything was erased. */
export function elimination(graph: TannerGraph): Decoder {
  const word = new Uint8Array(graph.H.cols);
  let iterations = 0;
  return fromSteps({
    begin(received) {
      word.set(received);
      iterations = 0;
    },
    step() {
      if (!word.includes(erased)) return { word, iterations, converged: true };
      if (iterations === 1) return { word, iterations, converged: false };
      solveErased(graph, word);
      iterations = 1;
      return null;
    },
  });
}

function solveErased(graph: TannerGraph, word: Uint8Array): void {
  const unknowns: number[] = [];
  word.forEach((mark, j) => {
    if (mark === erased) unknowns.push(j);
  });
  for (const { unknown, value } of determined(equations(graph, word, unknowns), unknowns.length)) {
    word[unknowns[unknown]!] = value;
  }
}

/** One bit-packed equation a check with an erased bit: bit u for unknown u, and the right-hand side as the bit after
 *  the last unknown. */
function equations({ H }: TannerGraph, word: Uint8Array, unknowns: readonly number[]): Uint32Array[] {
  const place = new Map(unknowns.map((j, u) => [j, u]));
  const rows: Uint32Array[] = [];
  for (let i = 0; i < H.rows; i++) {
    const row = new Uint32Array((unknowns.length >> 5) + 1);
    let open = false;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) {
      const j = H.colIndex[e]!;
      const known = word[j] !== erased;
      open ||= !known;
      if (!known) toggle(row, place.get(j)!);
      else if (word[j] === 1) toggle(row, unknowns.length);
    }
    if (open) rows.push(row);
  }
  return rows;
}

const toggle = (row: Uint32Array, at: number) => {
  row[at >> 5]! ^= 1 << (at & 31);
};
const bit = (row: Uint32Array, at: number) => (row[at >> 5]! >>> (at & 31)) & 1;

/** The unknowns that the equations fix, with their values. In reduced form these are the pivots whose row holds no
 *  other unknown. */
function determined(rows: Uint32Array[], unknowns: number): { unknown: number; value: number }[] {
  const pivots: number[] = [];
  for (let u = 0; u < unknowns; u++) {
    const rank = pivots.length;
    const found = rows.findIndex((row, r) => r >= rank && bit(row, u) === 1);
    if (found < 0) continue;
    [rows[rank], rows[found]] = [rows[found]!, rows[rank]!];
    const pivotRow = rows[rank]!;
    rows.forEach((row, r) => {
      if (r !== rank && bit(row, u)) for (let w = 0; w < row.length; w++) row[w]! ^= pivotRow[w]!;
    });
    pivots.push(u);
  }
  return pivots.flatMap((unknown, r) => {
    const row = rows[r]!;
    const value = bit(row, unknowns);
    if (value) toggle(row, unknowns);
    const weight = row.reduce((sum, w) => sum + ones(w), 0);
    return weight === 1 ? [{ unknown, value }] : [];
  });
}

function ones(w: number): number {
  let count = 0;
  for (let rest = w; rest !== 0; rest &= rest - 1) count += 1;
  return count;
}

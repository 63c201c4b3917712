import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { ParamError } from '../errors.ts';

/** The Tanner graph of a parity-check matrix seen from both sides. Edge e is the e-th one of H by rows: it joins check
 *  edgeCheck[e] to bit H.colIndex[e]. The edges of bit j are bitEdges[bitStart[j] .. bitStart[j+1]), ascending. */
export interface TannerGraph {
  H: SparseMatrix;
  edgeCheck: Uint32Array;
  bitStart: Uint32Array;
  bitEdges: Uint32Array;
}

export function tannerGraph(H: SparseMatrix): TannerGraph {
  const edges = H.colIndex.length;
  const edgeCheck = new Uint32Array(edges);
  for (let i = 0; i < H.rows; i++) edgeCheck.fill(i, H.rowStart[i], H.rowStart[i + 1]);
  const bitStart = new Uint32Array(H.cols + 1);
  for (const j of H.colIndex) bitStart[j + 1]!++;
  for (let j = 0; j < H.cols; j++) bitStart[j + 1]! += bitStart[j]!;
  const next = bitStart.slice(0, H.cols);
  const bitEdges = new Uint32Array(edges);
  for (let e = 0; e < edges; e++) bitEdges[next[H.colIndex[e]!]!++] = e;
  return { H, edgeCheck, bitStart, bitEdges };
}

/** d_j, the number of checks on each bit.
 *  @throws ParamError on a bit in no check: no decoder could say anything about it. */
export function columnDegrees(H: SparseMatrix): Uint32Array {
  const degrees = new Uint32Array(H.cols);
  for (const j of H.colIndex) degrees[j]!++;
  const empty = degrees.indexOf(0);
  if (empty >= 0) throw new ParamError('H', `an empty column ${empty}`, 'a matrix with a one in every column');
  return degrees;
}

export function largestDegree(degrees: Uint32Array): number {
  return degrees.reduce((most, d) => Math.max(most, d), 0);
}

/** Whether every check holds for the word; a mark other than 0 and 1 in it counts by its lowest bit. */
export function satisfies(H: SparseMatrix, word: Uint8Array): boolean {
  for (let i = 0; i < H.rows; i++) {
    let sum = 0;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
    if (sum & 1) return false;
  }
  return true;
}

/** Writes the syndrome of the word, one byte 0 or 1 a check. */
export function syndromeInto(H: SparseMatrix, word: Uint8Array, into: Uint8Array): void {
  for (let i = 0; i < H.rows; i++) {
    let sum = 0;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
    into[i] = sum & 1;
  }
}

/** How many checks on bit j fail. */
export function failingChecks(graph: TannerGraph, syndrome: Uint8Array, j: number): number {
  let count = 0;
  for (let t = graph.bitStart[j]!; t < graph.bitStart[j + 1]!; t++)
    count += syndrome[graph.edgeCheck[graph.bitEdges[t]!]!]!;
  return count;
}

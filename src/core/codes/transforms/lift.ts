import { z } from 'zod';
import { type SeededRandom, seededRandom } from '../../algebra/seeded-random.ts';
import { ParamError } from '../../errors.ts';
import { matrixFromRows, type SparseMatrix } from '../sparse-matrix.ts';
import { LiftedGraph } from './lifted-graph.ts';
import { columnsOf } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

/** Replaces each one by a circulant permutation of the size given, which makes a quasi-cyclic code. Shifts are drawn entry by
 *  entry, farthest first, as progressive edge growth does (Hu, Eleftheriou and Arnold 2005; on circulants Li and Kumar
 *  2004), so that no cycle is shorter than `girth`. The same seed gives the same code. Not every girth is reached at every
 *  size: a base with two rows that share three columns cannot pass 12 at any (Fossorier 2004). */
export const lift = defineTransform({
  kind: 'lift',
  title: 'Lift by circulants',
  schema: z.strictObject({
    kind: z.literal('lift'),
    size: z.int().min(2).max(4096),
    girth: z.int().min(4).max(12).multipleOf(2).default(6),
    seed: z.string().max(200).default('lift'),
    attempts: z.int().min(1).max(1000).default(20),
  }),
  apply({ H }, { size, girth, seed, attempts }) {
    for (let attempt = 0; attempt < attempts; attempt++) {
      const shifts = drawShifts(H, size, girth, seededRandom(`${seed}/${attempt}`));
      if (shifts) return { H: lifted(H, size, shifts) };
    }
    throw new ParamError(
      'girth',
      girth,
      `a girth that ${attempts} draws of circulants of size ${size} reach; try a larger size`,
    );
  },
});

/** A shift for each one, in the order of H.colIndex; null when some entry has none left. */
function drawShifts(H: SparseMatrix, size: number, girth: number, random: SeededRandom): Int32Array | null {
  const graph = new LiftedGraph(H.rows, H.cols, size);
  const shifts = new Map<number, number>();
  for (const [column, rows] of columnsOf(H).entries()) {
    for (const row of rows) {
      const shift = graph.farthestShift(column, row, girth, random);
      if (shift < 0) return null;
      graph.add(column, row, shift);
      shifts.set(row * H.cols + column, shift);
    }
  }
  const ordered = new Int32Array(H.colIndex.length);
  for (let r = 0; r < H.rows; r++) {
    for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) ordered[e] = shifts.get(r * H.cols + H.colIndex[e]!)!;
  }
  return ordered;
}

/** Row x of the block at (r, c) has its one at column x + shift of the block. */
function lifted(H: SparseMatrix, size: number, shifts: Int32Array): SparseMatrix {
  const rows: number[][] = [];
  for (let r = 0; r < H.rows; r++) {
    for (let x = 0; x < size; x++) {
      const row: number[] = [];
      for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) {
        row.push(H.colIndex[e]! * size + ((x + shifts[e]!) % size));
      }
      rows.push(row);
    }
  }
  return matrixFromRows(H.cols * size, rows);
}

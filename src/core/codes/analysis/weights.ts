import { type SparseMatrix, transpose } from '../sparse-matrix.ts';

/** Weights with the number of lines that have each, ascending by weight. */
export type WeightProfile = [weight: number, count: number][];

export function rowWeightProfile(H: SparseMatrix): WeightProfile {
  const counts = new Map<number, number>();
  for (let i = 0; i < H.rows; i++) {
    const weight = H.rowStart[i + 1]! - H.rowStart[i]!;
    counts.set(weight, (counts.get(weight) ?? 0) + 1);
  }
  return [...counts].sort(([a], [b]) => a - b);
}

export function columnWeightProfile(H: SparseMatrix): WeightProfile {
  return rowWeightProfile(transpose(H));
}

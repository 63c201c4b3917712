import { seededRandom } from '../../../algebra/seeded-random.ts';
import { rowOf, type SparseMatrix, transpose } from '../../sparse-matrix.ts';

/** Small stopping sets by seeded descent: from a random set of columns, what peeling leaves is a stopping set; one column after
 *  another is taken out and the rest peeled again, as long as something is left. Each descent ends in a set that holds no
 *  smaller one. The smallest met is given; that none smaller was met proves nothing. Null when every erasure peels.
 *  `edgeVisits` bounds the work, and a set of `goal` columns or fewer ends it. */
export function searchStoppingSets(
  H: SparseMatrix,
  { seed, edgeVisits, goal = 0 }: { seed: string; edgeVisits: number; goal?: number },
): Uint32Array | null {
  const random = seededRandom(seed);
  const peeler = new Peeler(H);
  let best: Uint32Array | null = null;
  while (peeler.visits < edgeVisits && (best?.length ?? H.cols + 1) > goal) {
    const all = random.shuffle(Uint32Array.from({ length: H.cols }, (_, c) => c));
    let current = peeler.residual(all.subarray(0, startSize(H, best)));
    if (current.length === 0) current = peeler.residual(all);
    if (current.length === 0) return null;
    for (let tries = random.shuffle(current.slice()), i = 0; i < tries.length && peeler.visits < edgeVisits; ) {
      const without = current.filter((c) => c !== tries[i]);
      const left = peeler.residual(without);
      if (left.length > 0) {
        current = left;
        tries = random.shuffle(current.slice());
        i = 0;
      } else i++;
      // A descent still above the best after trying a quarter of its columns is left for another.
      if (best && i > current.length / 4 && current.length > 2 * best.length) break;
    }
    if (!best || current.length < best.length) best = current;
  }
  return best && minimal(peeler, best).sort();
}

/** Takes out whatever can be, so that a search cut short still ends in a set of its kind. */
function minimal(peeler: Peeler, set: Uint32Array): Uint32Array {
  for (const c of set) {
    const left = peeler.residual(set.filter((other) => other !== c));
    if (left.length > 0) return minimal(peeler, left);
  }
  return set;
}

/** Somewhat more erasures than checks leave something behind, and no more than are needed keep it small. */
function startSize(H: SparseMatrix, best: Uint32Array | null): number {
  const most = Math.min(H.cols, H.rows + 1);
  return best ? Math.max(Math.min(most, 2 * best.length), Math.ceil(most * 0.6)) : most;
}

/** Peeling (Luby et al. 1997): a check that meets the set once takes its column out. */
class Peeler {
  visits = 0;
  private readonly T: SparseMatrix;
  private readonly inside: Uint8Array;
  private readonly degree: Int32Array;

  constructor(private readonly H: SparseMatrix) {
    this.T = transpose(H);
    this.inside = new Uint8Array(H.cols);
    this.degree = new Int32Array(H.rows);
  }

  residual(columns: Uint32Array): Uint32Array {
    const { H, T, inside, degree } = this;
    // Columns without checks cost nothing to peel, and yet a round of the search.
    this.visits += columns.length + 1;
    for (const c of columns) {
      inside[c] = 1;
      for (const r of rowOf(T, c)) degree[r]!++;
      this.visits += T.rowStart[c + 1]! - T.rowStart[c]!;
    }
    const stack: number[] = [];
    for (const c of columns) for (const r of rowOf(T, c)) if (degree[r] === 1) stack.push(r);
    for (let r = stack.pop(); r !== undefined; r = stack.pop()) {
      if (degree[r] !== 1) continue;
      const c = rowOf(H, r).find((column) => inside[column] === 1)!;
      this.visits += H.rowStart[r + 1]! - H.rowStart[r]!;
      inside[c] = 0;
      for (const other of rowOf(T, c)) if (--degree[other]! === 1) stack.push(other);
    }
    const left = columns.filter((c) => inside[c] === 1);
    for (const c of left) {
      inside[c] = 0;
      for (const r of rowOf(T, c)) degree[r] = 0;
    }
    return left;
  }
}

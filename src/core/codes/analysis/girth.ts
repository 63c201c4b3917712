import { type SparseMatrix, transpose } from '../sparse-matrix.ts';
import { type TannerOrbits, tannerOrbits } from './tanner-orbits.ts';

/** Length of the shortest cycle of the Tanner graph; Infinity for a forest. Breadth-first search from one column of
 *  each orbit, each search cut off at the best length so far. */
export function girth(H: SparseMatrix, orbits: TannerOrbits = tannerOrbits(H)): number {
  const search = cycleSearch(H);
  let best = Number.POSITIVE_INFINITY;
  for (const column of orbits.columns.representatives) {
    best = Math.min(best, search(column, best));
    if (best === 4) break;
  }
  return best;
}

/** Length of the shortest cycle through each column; Infinity where there is none below `cap`. */
export function localGirths(H: SparseMatrix, cap = Number.POSITIVE_INFINITY): Float64Array {
  const search = cycleSearch(H, true);
  return Float64Array.from({ length: H.cols }, (_, column) => search(column, cap));
}

/** A search for the shortest cycle met from a column, below a cap. Unless `through` is asked for, the cycle found need
 *  not pass the root, which serves the minimum over all roots just as well and ends sooner. */
function cycleSearch(H: SparseMatrix, through = false): (root: number, cap: number) => number {
  const T = transpose(H);
  const nodes = H.cols + H.rows;
  const seen = new Uint32Array(nodes);
  const parent = new Uint32Array(nodes);
  const depth = new Uint32Array(nodes);
  const branch = new Uint32Array(nodes);
  const queue = new Uint32Array(nodes);
  let stamp = 0;
  return (root, cap) => {
    stamp++;
    let best = cap;
    let head = 0;
    let tail = 1;
    queue[0] = root;
    seen[root] = stamp;
    depth[root] = 0;
    parent[root] = root;
    while (head < tail) {
      const node = queue[head++]!;
      const d = depth[node]!;
      // Any cycle closed from here on has length 2d + 1 at least, and lengths are even.
      if (2 * d + 2 > best || 2 * d + 2 === cap) break;
      const isColumn = node < H.cols;
      const { rowStart, colIndex } = isColumn ? T : H;
      const line = isColumn ? node : node - H.cols;
      const shift = isColumn ? H.cols : 0;
      for (let e = rowStart[line]!; e < rowStart[line + 1]!; e++) {
        const next = colIndex[e]! + shift;
        if (seen[next] !== stamp) {
          seen[next] = stamp;
          depth[next] = d + 1;
          parent[next] = node;
          branch[next] = d === 0 ? next : branch[node]!;
          queue[tail++] = next;
        } else if (next !== parent[node] && !(through && branch[next] === branch[node])) {
          best = Math.min(best, d + depth[next]! + 1);
        }
      }
    }
    return best < cap ? best : Number.POSITIVE_INFINITY;
  };
}

import { rowOf, type SparseMatrix, transpose } from '../../src/core/codes/sparse-matrix.ts';

/** Numbers of cycles of the Tanner graph by length up to `longest`, by walking every simple path: the plain twin. */
export function plainCycles(H: SparseMatrix, longest: number): Map<number, number> {
  const T = transpose(H);
  const nodes = H.cols + H.rows;
  const neighbours = Array.from({ length: nodes }, (_, node) =>
    node < H.cols ? Array.from(rowOf(T, node), (r) => r + H.cols) : Array.from(rowOf(H, node - H.cols)),
  );
  const counts = new Map<number, number>();
  const onPath = new Uint8Array(nodes);
  const walk = (root: number, node: number, length: number) => {
    for (const next of neighbours[node]!) {
      if (next === root && length >= 3) counts.set(length + 1, (counts.get(length + 1) ?? 0) + 1);
      // The root is the least node of its cycle, so that each cycle is met from one root, in two directions.
      else if (next > root && !onPath[next] && length + 1 < longest) {
        onPath[next] = 1;
        walk(root, next, length + 1);
        onPath[next] = 0;
      }
    }
  };
  for (let root = 0; root < nodes; root++) walk(root, root, 0);
  return new Map([...counts].filter(([length]) => length >= 4).map(([length, count]) => [length, count / 2]));
}

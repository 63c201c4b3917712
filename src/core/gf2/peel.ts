import { matrixFromRows, rowOf, type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';

/** What is left of a matrix after removing, again and again, a row or column that holds a single one, together with the
 *  column or row that one lies in. Each removal is a pivot that fills nothing in: rank(H) = pivots + rank(core). */
export interface Peeled {
  pivots: number;
  core: SparseMatrix;
}

/** Sparse pre-elimination without fill. Leaves a core in which every row and every column has two ones or more. */
export function peel(H: SparseMatrix): Peeled {
  if (!hasSingleOne(H)) return { pivots: 0, core: H };
  const T = transpose(H);
  const lines = [weightsOf(H), weightsOf(T)] as const;
  const gone = [new Uint8Array(H.rows), new Uint8Array(H.cols)] as const;
  const stack: [side: 0 | 1, index: number][] = [];
  for (const side of [0, 1] as const) {
    lines[side].forEach((weight, i) => {
      if (weight === 1) stack.push([side, i]);
    });
  }
  const sides = [H, T] as const;
  const remove = (side: 0 | 1, index: number) => {
    gone[side][index] = 1;
    const other = (1 - side) as 0 | 1;
    for (const j of rowOf(sides[side], index)) {
      if (!gone[other][j] && --lines[other][j]! === 1) stack.push([other, j]);
    }
  };
  let pivots = 0;
  for (let next = stack.pop(); next; next = stack.pop()) {
    const [side, index] = next;
    if (gone[side][index] || lines[side][index] !== 1) continue;
    const other = (1 - side) as 0 | 1;
    const partner = rowOf(sides[side], index).find((j) => !gone[other][j])!;
    pivots++;
    gone[side][index] = 1;
    remove(other, partner);
  }
  return { pivots, core: surviving(H, gone[0], gone[1]) };
}

/** Whether some row or column holds exactly one; most matrices of designs end here. */
function hasSingleOne(H: SparseMatrix): boolean {
  const counts = new Uint32Array(H.cols);
  for (let e = 0; e < H.colIndex.length; e++) counts[H.colIndex[e]!]!++;
  return counts.includes(1) || weightsOf(H).includes(1);
}

function weightsOf(H: SparseMatrix): Uint32Array {
  return Uint32Array.from({ length: H.rows }, (_, i) => H.rowStart[i + 1]! - H.rowStart[i]!);
}

function surviving(H: SparseMatrix, goneRow: Uint8Array, goneCol: Uint8Array): SparseMatrix {
  const name = new Uint32Array(H.cols);
  let cols = 0;
  for (let c = 0; c < H.cols; c++) name[c] = goneCol[c] ? 0 : cols++;
  const rows: Uint32Array[] = [];
  for (let r = 0; r < H.rows; r++) {
    if (goneRow[r]) continue;
    const row = rowOf(H, r)
      .filter((c) => !goneCol[c])
      .map((c) => name[c]!);
    if (row.length > 0) rows.push(row);
  }
  return matrixFromRows(cols, rows);
}

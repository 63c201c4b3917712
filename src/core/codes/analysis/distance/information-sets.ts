import { BitMatrix } from '../../../gf2/bit-matrix.ts';

/** Generator matrices of one code, each the identity on a set of columns of its own: rank many of them, k for all but the
 *  last ones, while columns last that are independent of each other. */
export interface InformationSet {
  matrix: BitMatrix;
  rank: number;
}

export function disjointInformationSets(basis: BitMatrix): InformationSet[] {
  const sets: InformationSet[] = [];
  const used = new Uint8Array(basis.cols);
  for (let current = basis; ; ) {
    const matrix = copyOf(current);
    const rank = reduceOn(matrix, used);
    if (rank === 0) return sets;
    sets.push({ matrix, rank });
    current = matrix;
  }
}

function copyOf(source: BitMatrix): BitMatrix {
  const copy = new BitMatrix(source.rows, source.cols);
  copy.words.set(source.words);
  return copy;
}

/** Gauss–Jordan elimination with pivots among the columns not used yet, which it then marks as used. */
function reduceOn(matrix: BitMatrix, used: Uint8Array): number {
  let rank = 0;
  for (let c = 0; c < matrix.cols && rank < matrix.rows; c++) {
    if (used[c]) continue;
    let pivot = rank;
    while (pivot < matrix.rows && !matrix.get(pivot, c)) pivot++;
    if (pivot === matrix.rows) continue;
    matrix.swapRows(pivot, rank);
    for (let r = 0; r < matrix.rows; r++) if (r !== rank && matrix.get(r, c)) matrix.addRow(r, rank);
    used[c] = 1;
    rank++;
  }
  return rank;
}

import { countPasches } from '../../../designs/pasch.ts';
import type { Citation } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';
import { type SparseMatrix, transpose } from '../../sparse-matrix.ts';
import { columnWeightProfile } from '../weights.ts';

const paschCode: Citation = {
  authors: 'S. J. Johnson, S. R. Weller',
  year: 2001,
  title: 'Construction of low-density parity-check codes from Kirkman triple systems',
  where: 'Proc. IEEE Globecom 2001, 970–974',
  part: 'words of weight 4 are Pasch configurations',
};

/** Number of codewords of weight 4 when columns are triples of which no two share two checks: four triples that meet every
 *  point an even number of times are a Pasch configuration, and each pair of them shares exactly one point. Null for other
 *  matrices, which the girth tells: columns of weight 3 and no cycle of length 4. */
export function weightFourWords(
  H: SparseMatrix,
  girth: number,
  onProgress?: (share: number) => void,
): Graded<number> | null {
  const profile = columnWeightProfile(H);
  if (girth < 6 || profile.length !== 1 || profile[0]![0] !== 3 || H.rows > MOST_POINTS) return null;
  const { rowStart, colIndex } = transpose(H);
  const design = { v: H.rows, b: H.cols, blockStart: rowStart, blockPoints: colIndex };
  return {
    value: countPasches(design, onProgress),
    grade: 'computed',
    method: 'Pasch configurations of the triples, counted',
    source: paschCode,
  };
}

/** The table of pairs takes two bytes a pair. */
const MOST_POINTS = 8192;

import { transpose } from '../../codes/sparse-matrix.ts';
import type { BlockDesign } from '../block-design.ts';

/** Points and blocks exchanged. */
export function transposeDesign({ v, b, blockStart, blockPoints }: BlockDesign): BlockDesign {
  const dual = transpose({ rows: b, cols: v, rowStart: blockStart, colIndex: blockPoints });
  return { v: b, b: v, blockStart: dual.rowStart, blockPoints: dual.colIndex };
}

import type { DesignPrediction } from '../designs/family.ts';
import { analyseLdpc } from './analyse-ldpc.ts';
import type { LdpcCode } from './ldpc.ts';
import { propertiesOf } from './properties.ts';

const nothingPredicted: DesignPrediction = { t: 0, v: 0, b: 0, k: 0, r: 0, lambda: 0, codes: [] };
/** Cycles of larger matrices without known symmetry are counted on demand. */
const MOST_ONES_FOR_CYCLES = 2_000_000;

/** What is computed of a matrix that no formula speaks of. */
export function describeMatrix(code: LdpcCode, clock: () => number) {
  const { H } = code;
  const analysis = analyseLdpc(code, { cycles: H.colIndex.length <= MOST_ONES_FOR_CYCLES, clock });
  const properties = propertiesOf(code, analysis, nothingPredicted);
  const { n, k, rowWeights, columnWeights } = analysis;
  return { H, n, k, properties, rowWeights, columnWeights };
}

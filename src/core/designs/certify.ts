import type { BlockDesign } from './block-design.ts';
import type { DesignPrediction } from './family.ts';
import { type DesignCertificate, verifyDesign } from './verify.ts';
import { verifyPartialLinear } from './verify-partial-linear.ts';

/** A certificate with the time it took. */
export type TimedCertificate = DesignCertificate & { elapsedMs: number };

/** Checks on the blocks what the family's formulas claim of them. `clock` gives milliseconds. */
export function certify(
  design: BlockDesign,
  { t, lambda, partialLinear }: Pick<DesignPrediction, 't' | 'lambda' | 'partialLinear'>,
  clock: () => number,
): TimedCertificate {
  const from = clock();
  const certificate = partialLinear ? verifyPartialLinear(design, lambda) : verifyDesign(design, { t, lambda });
  return { ...certificate, elapsedMs: clock() - from };
}

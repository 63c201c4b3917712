import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';

/** The t that |T| of Student's law with that many degrees of freedom stays within at the given probability: with
 *  w = t²/(ν + t²) of Beta(1/2, ν/2), whose small values keep their accuracy for large ν. */
export function studentQuantile(level: number, degrees: number): number {
  const w = betaQuantile(level, 0.5, degrees / 2);
  return Math.sqrt((degrees * w) / (1 - w));
}

/** The z that a standard Gaussian stays within, either side, at the given probability. */
export function gaussianQuantile(level: number): number {
  return studentQuantile(level, 1e10);
}

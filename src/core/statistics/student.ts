import { lowerQuantile, upperQuantile } from './beta-quantile.ts';

/** The t that |T| of Student's law with that many degrees of freedom stays within at the given probability: with
 *  w = t²/(ν + t²) of Beta(1/2, ν/2), of which the smaller of w and 1 − w is found. */
export function studentQuantile(level: number, degrees: number): number {
  if (level < 0.5) return Math.sqrt(oddsOf(lowerQuantile(level, 0.5, degrees / 2)) * degrees);
  const tail = 1 - level;
  if (degrees > 10) return Math.sqrt(oddsOf(upperQuantile(tail, 0.5, degrees / 2)) * degrees);
  return Math.sqrt(degrees / oddsOf(lowerQuantile(tail, degrees / 2, 0.5)));
}

const oddsOf = (w: number): number => w / (1 - w);

/** The z that a standard Gaussian stays within, either side, at the given probability. */
export function gaussianQuantile(level: number): number {
  return studentQuantile(level, 1e10);
}

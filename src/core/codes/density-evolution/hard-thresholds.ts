import { logBinomialTerm } from '../../statistics/binomial-term.ts';
import { averageOver, type DegreeFractions, type EdgeDegrees } from './edge-degrees.ts';
import { fixedPointThreshold } from './fixed-point-threshold.ts';

/** Largest crossover probability below which Gallager's algorithm B drives errors to zero on cycle-free graphs. With
 *  `flip` the number of disagreeing checks that turns a message is fixed; without it the best number is taken in each
 *  iteration (Gallager 1963, §4.3; Richardson and Urbanke 2001). Algorithm A asks for all dv − 1. */
export function gallagerThreshold(degrees: EdgeDegrees, rule: { flip?: number; unanimous?: boolean }): number {
  const { columns } = degrees;
  const choices = (dv: number): number[] => {
    if (rule.unanimous) return [dv - 1];
    if (rule.flip !== undefined) return [Math.min(rule.flip, dv - 1)];
    const least = Math.min(dv - 1, Math.ceil(dv / 2));
    return Array.from({ length: dv - least }, (_, i) => least + i);
  };
  return fixedPointThreshold((x) => {
    if (x >= 0.5) return 0.5;
    const a = checkError(degrees, x);
    // A start above x does not get below it either, hence the greater of the two.
    return Math.max(x, fixedAt(x, columns, choices, a));
  }, 0.5);
}

/** The step is B + p·(1 − A − B), A the chance that a wrong bit is turned and B that a right one is; x is fixed at
 *  p = (x − B)/(1 − A − B). The best choice is the one that allows the largest p. */
function fixedAt(x: number, columns: DegreeFractions, choices: (dv: number) => number[], a: number): number {
  const regular = columns.length === 1;
  const options = regular ? choices(columns[0]![0]) : [undefined];
  return Math.max(
    ...options.map((b) => {
      const flip = (dv: number) => b ?? choices(dv)[0]!;
      const broken = averageOver(columns, (dv) => between(dv - 1, flip(dv), dv - 1, a));
      const slope = averageOver(columns, (dv) => between(dv - 1, dv - flip(dv), flip(dv) - 1, a));
      if (slope > 0) return (x - broken) / slope;
      return x > broken ? Number.POSITIVE_INFINITY : 0;
    }),
  );
}

/** Probability that a message from a check is wrong when its inputs are wrong with probability x. */
function checkError({ rows }: EdgeDegrees, x: number): number {
  return averageOver(rows, (dc) => -Math.expm1((dc - 1) * Math.log1p(-2 * x)) / 2);
}

/** P(from ≤ W ≤ to) for W binomial(n, p). */
function between(n: number, from: number, to: number, p: number): number {
  let sum = 0;
  for (let j = from; j <= to; j++) sum += Math.exp(logBinomialTerm(n, j, p));
  return sum;
}

/** Largest erasure probability below which peeling recovers cycle-free graphs: the least x/λ(1 − ρ(1 − x)) (Luby and
 *  others 1997). */
export function erasureThreshold(degrees: EdgeDegrees): number {
  return fixedPointThreshold((x) => {
    const unknown = averageOver(degrees.rows, (dc) => -Math.expm1((dc - 1) * Math.log1p(-x)));
    return x / averageOver(degrees.columns, (dv) => unknown ** (dv - 1));
  }, 1);
}

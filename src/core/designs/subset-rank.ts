/** Subsets of 0..v−1 of one size numbered 0..C(v,t)−1 in colexicographic order: {p₁ < … < p_t} ↦ ΣC(pᵢ, i)
 *  (the combinatorial number system; Lehmer 1964). A counter for every subset is then one flat array. */
export interface SubsetRanking {
  v: number;
  t: number;
  /** C(v, t). */
  count: number;
  /** terms[i][p] = C(p, i + 1), the share of a point p standing at place i. */
  terms: Float64Array[];
}

/** C(n, k) as a double: exact below 2^53, correctly large above. */
export function binomial(n: number, k: number): number {
  if (k < 0 || k > n) return 0;
  let result = 1;
  for (let i = 1; i <= Math.min(k, n - k); i++) result = Math.round((result * (n - Math.min(k, n - k) + i)) / i);
  return result;
}

/** C(n, k) exactly. */
export function binomialExact(n: number, k: number): bigint {
  if (k < 0 || k > n) return 0n;
  let result = 1n;
  for (let i = 1; i <= k; i++) result = (result * BigInt(n - k + i)) / BigInt(i);
  return result;
}

export function subsetRanking(v: number, t: number): SubsetRanking {
  const terms = Array.from({ length: t }, (_, i) => Float64Array.from({ length: v }, (_, p) => binomial(p, i + 1)));
  return { v, t, count: binomial(v, t), terms };
}

/** The subset of a given number, ascending. */
export function subsetOfRank({ v, t, terms }: SubsetRanking, rank: number): number[] {
  const points = new Array<number>(t);
  let rest = rank;
  let p = v - 1;
  for (let i = t - 1; i >= 0; i--) {
    while (terms[i]![p]! > rest) p--;
    points[i] = p;
    rest -= terms[i]![p]!;
    p--;
  }
  return points;
}

/** Number of an ascending subset. */
export function rankOfSubset({ terms }: SubsetRanking, points: ArrayLike<number>): number {
  let rank = 0;
  for (let i = 0; i < points.length; i++) rank += terms[i]![points[i]!]!;
  return rank;
}

import { binomial } from '../../designs/subset-rank.ts';
import type { Citation } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';
import type { ConstantWeightCode } from './constant-weight-code.ts';
import { type KnownSize, knownSize } from './known-size.ts';

/** `optimal`: no code of this length, weight and distance has more words. `published`: as many as the published table, whose
 *  word is not checked here. `smaller`: a code with more words is known. `open`: none of these. */
export type Optimality = 'optimal' | 'published' | 'smaller' | 'open';

const SCHONHEIM: Citation = {
  authors: 'J. Schönheim',
  year: 1966,
  title: 'On maximal systems of k-tuples',
  where: 'Studia Sci. Math. Hungar. 1, 363–368',
};

export interface SizeVerdict {
  optimality: Graded<Optimality>;
  known: KnownSize;
}

/** Holds a code's number of words against all that is known of A(n, d, w). The distance is the computed one; a distance known
 *  only as a bound says nothing, and null is returned, as for a code that repeats words. */
export function sizeVerdict(code: ConstantWeightCode): SizeVerdict | null {
  const { n, w, M, distance, distanceEvidence } = code;
  if (M < 2 || distance < 2 || distanceEvidence.grade === 'bounded') return null;
  const known = knownSize(n, distance, w);
  return { optimality: optimalityOf(code, known), known };
}

function optimalityOf(
  { n, w, M, distance }: ConstantWeightCode,
  { lower, upper, published }: KnownSize,
): Graded<Optimality> {
  // Words of distance 2(k − t + 1) share no t ones, and C(n,t)/C(k,t) of them leave no t-subset out.
  const k = Math.min(w, n - w);
  const t = k - distance / 2 + 1;
  const whole = t >= 1 && M * binomial(k, t) === binomial(n, t);
  if (whole)
    return {
      value: 'optimal',
      grade: 'proved',
      method: `Steiner system S(${t}, ${k}, ${n}): each ${t}-subset in one block`,
      source: SCHONHEIM,
    };
  if (M === upper.size)
    return { value: 'optimal', grade: 'proved', method: `meets the bound: ${upper.by}`, source: upper.source };
  if (M < lower.size && published?.status !== 'recalled')
    return { value: 'smaller', grade: 'proved', method: `${lower.size} words: ${lower.by}`, source: lower.source };
  if (published)
    return {
      value: M < published.size ? 'smaller' : 'published',
      grade: 'bounded',
      method: `published size ${published.size}, not computed again here`,
      source: lower.source,
    };
  return { value: 'open', grade: 'bounded', method: `between ${lower.size} and ${upper.size} words are possible` };
}

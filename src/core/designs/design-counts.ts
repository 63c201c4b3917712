import type { Citation } from '../errors.ts';
import { ParamError } from '../errors.ts';
import { binomial } from './subset-rank.ts';

/** Different designs on the same named points that are isomorphic to one with this group: v!/|Aut|. */
export function labelledCopies(v: number, automorphisms: bigint): bigint {
  let factorial = 1n;
  for (let i = 2n; i <= BigInt(v); i++) factorial *= i;
  if (automorphisms < 1n || factorial % automorphisms !== 0n) {
    throw new ParamError('automorphisms', automorphisms, `a divisor of ${v}!`);
  }
  return factorial / automorphisms;
}

export interface AsymptoticCount {
  /** Logarithm to base 10 of the leading term. */
  log10: number;
  /** Always an estimate: the theorem speaks of v → ∞ and gives no error term for one v. */
  kind: 'asymptotic';
  formula: string;
  source: Citation;
}

/** Leading term of the number of labelled Steiner systems S(t,k,v): (e^(1−Q)·N)^(C(v,t)/Q) with Q = C(k,t) and
 *  N = C(v−t, k−t). For triple systems (v/e²)^(v²/6). Where the divisibility conditions fail the count is 0, which the
 *  caller must have checked. */
export function asymptoticSteinerCount({ t, k, v }: { t: number; k: number; v: number }): AsymptoticCount {
  const Q = binomial(k, t);
  const N = binomial(v - t, k - t);
  const log10 = (binomial(v, t) / Q) * ((1 - Q) / Math.LN10 + Math.log10(N));
  const triples = t === 2 && k === 3;
  return {
    log10,
    kind: 'asymptotic',
    formula: triples ? '((1 + o(1)) v/e²)^(v²/6)' : '((e^(1−Q) + o(1)) N)^(C(v,t)/Q)',
    source: triples
      ? {
          authors: 'N. Linial, Z. Luria; P. Keevash',
          year: 2013,
          title: 'An upper bound on the number of Steiner triple systems; Counting Steiner triple systems (2018)',
          where: 'Random Struct. Algor. 43, 399–406; European Congress of Mathematics 2016, 459–481',
        }
      : {
          authors: 'P. Keevash',
          year: 2018,
          title: 'Counting designs',
          where: 'J. Eur. Math. Soc. 20, 903–927',
        },
  };
}

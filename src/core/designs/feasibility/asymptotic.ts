import type { DesignQuery, FeasibilityRule } from './rule.ts';

/** Theorems that grant every sufficiently large v without saying how large: a reason to hope, never a verdict. */
export const asymptoticNotes: readonly (Pick<FeasibilityRule, 'id' | 'source'> & {
  appliesTo(query: DesignQuery): boolean;
  statement: string;
})[] = [
  {
    id: 'wilson',
    appliesTo: ({ t, resolvable }) => t === 2 && !resolvable,
    statement:
      'For fixed k and λ every sufficiently large admissible v has a 2-(v,k,λ) design; no bound on "sufficiently large" is used here, so this decides nothing for the v asked.',
    source: {
      authors: 'R. M. Wilson',
      year: 1975,
      title: 'An existence theory for pairwise balanced designs III',
      where: 'J. Combin. Theory A 18, 71–79',
    },
  },
  {
    id: 'ray-chaudhuri-wilson-resolvable',
    appliesTo: ({ t, lambda, resolvable }) => t === 2 && lambda === 1 && resolvable === true,
    statement:
      'For fixed k every sufficiently large v ≡ k (mod k(k − 1)) has a resolvable 2-(v,k,1) design; no bound on "sufficiently large" is used here, so this decides nothing for the v asked.',
    source: {
      authors: 'D. K. Ray-Chaudhuri, R. M. Wilson',
      year: 1973,
      title: 'The existence of resolvable block designs',
      where: 'A Survey of Combinatorial Theory, North-Holland, 361–375',
    },
  },
  {
    id: 'keevash',
    appliesTo: ({ t, resolvable }) => t >= 3 && !resolvable,
    statement:
      'For fixed t, k and λ every sufficiently large admissible v has a t-(v,k,λ) design; no bound on "sufficiently large" is known to reach the v asked, so this decides nothing for it.',
    source: {
      authors: 'P. Keevash',
      year: 2018,
      title: 'The existence of designs II',
      where: 'arXiv:1802.05900',
      part: 'after Keevash 2014',
    },
  },
];

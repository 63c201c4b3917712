import type { Citation } from '../../errors.ts';
import type { DesignQuery, FeasibilityRule } from './rule.ts';

interface Spectrum {
  id: string;
  /** The parameters the theorem is about, λ and v left open where it allows. */
  covers(query: DesignQuery): boolean;
  /** Holds for admissible parameters but these. */
  exceptions: readonly number[];
  statement: string;
  source: Citation;
}

const hanani = (year: number, title: string, where: string): Citation => ({ authors: 'H. Hanani', year, title, where });

/** Families whose whole spectrum is settled: every admissible parameter set is realised, but for the exceptions named. */
const spectra: readonly Spectrum[] = [
  {
    id: 'triples',
    covers: ({ t, k, resolvable }) => t === 2 && k === 3 && !resolvable,
    exceptions: [],
    statement:
      'A 2-(v,3,λ) design exists whenever the divisibility conditions hold; for λ = 1 these are v ≡ 1, 3 (mod 6).',
    source: hanani(
      1961,
      'The existence and construction of balanced incomplete block designs',
      'Ann. Math. Statist. 32, 361–386',
    ),
  },
  {
    id: 'quadruple-pairs',
    covers: ({ t, k, resolvable }) => t === 2 && k === 4 && !resolvable,
    exceptions: [],
    statement:
      'A 2-(v,4,λ) design exists whenever the divisibility conditions hold; for λ = 1 these are v ≡ 1, 4 (mod 12).',
    source: hanani(
      1961,
      'The existence and construction of balanced incomplete block designs',
      'Ann. Math. Statist. 32, 361–386',
    ),
  },
  {
    id: 'quintuple-pairs',
    covers: ({ t, v, k, lambda, resolvable }) => t === 2 && k === 5 && !resolvable && !(v === 15 && lambda === 2),
    exceptions: [],
    statement:
      'A 2-(v,5,λ) design exists whenever the divisibility conditions hold, but for 2-(15,5,2); for λ = 1 these are v ≡ 1, 5 (mod 20).',
    source: hanani(
      1972,
      'On balanced incomplete block designs with blocks having five elements',
      'J. Combin. Theory A 12, 184–201',
    ),
  },
  {
    id: 'quadruple-systems',
    covers: ({ t, k, lambda, resolvable }) => t === 3 && k === 4 && lambda === 1 && !resolvable,
    exceptions: [],
    statement: 'A Steiner quadruple system S(3,4,v) exists exactly when v ≡ 2, 4 (mod 6).',
    source: hanani(1960, 'On quadruple systems', 'Canad. J. Math. 12, 145–157'),
  },
  {
    id: 'kirkman',
    covers: ({ t, k, lambda, resolvable }) => t === 2 && k === 3 && lambda === 1 && resolvable === true,
    exceptions: [],
    statement: 'A Kirkman triple system exists exactly when v ≡ 3 (mod 6).',
    source: {
      authors: 'D. K. Ray-Chaudhuri, R. M. Wilson',
      year: 1971,
      title: "Solution of Kirkman's schoolgirl problem",
      where: 'Proc. Sympos. Pure Math. 19, 187–203',
    },
  },
  {
    id: 'resolvable-quadruples',
    covers: ({ t, k, lambda, resolvable }) => t === 2 && k === 4 && lambda === 1 && resolvable === true,
    exceptions: [],
    statement: 'A resolvable 2-(v,4,1) design exists exactly when v ≡ 4 (mod 12).',
    source: {
      authors: 'H. Hanani, D. K. Ray-Chaudhuri, R. M. Wilson',
      year: 1972,
      title: 'On resolvable designs',
      where: 'Discrete Math. 3, 343–357',
    },
  },
  {
    id: 'resolvable-triples-twice',
    covers: ({ t, v, k, lambda, resolvable }) =>
      t === 2 && k === 3 && lambda === 2 && resolvable === true && v % 3 === 0,
    exceptions: [6],
    statement: 'A resolvable 2-(v,3,2) design exists exactly when v ≡ 0 (mod 3) and v is not 6.',
    source: hanani(1974, 'On resolvable balanced incomplete block designs', 'J. Combin. Theory A 17, 275–289'),
  },
  {
    id: 'resolvable-quadruples-thrice',
    covers: ({ t, v, k, lambda, resolvable }) =>
      t === 2 && k === 4 && lambda === 3 && resolvable === true && v % 4 === 0,
    exceptions: [],
    statement: 'A resolvable 2-(v,4,3) design exists exactly when v ≡ 0 (mod 4).',
    source: {
      authors: 'R. D. Baker',
      year: 1983,
      title: 'Resolvable BIBD and SOLS',
      where: 'Discrete Math. 44, 13–29',
    },
  },
  {
    id: 'resolvable-quintuples',
    covers: ({ t, k, lambda, resolvable }) => t === 2 && k === 5 && lambda === 1 && resolvable === true,
    // Orders that the Handbook leaves undecided, from memory.
    exceptions: [45, 345, 465, 645],
    statement:
      'A resolvable 2-(v,5,1) design exists for every v ≡ 5 (mod 20) outside a list of four undecided orders up to 645.',
    source: {
      authors: 'R. J. R. Abel, G. Ge, M. Greig, L. Zhu',
      year: 2001,
      title: 'Resolvable BIBDs with a block size of 5',
      where: 'J. Statist. Plann. Inference 95, 49–65',
      part: 'quoted from memory',
    },
  },
  {
    id: 'resolvable-quadruple-systems',
    covers: ({ t, v, k, lambda, resolvable }) =>
      t === 3 && k === 4 && lambda === 1 && resolvable === true && v % 4 === 0,
    exceptions: [],
    statement: 'A resolvable Steiner quadruple system exists exactly when v ≡ 4, 8 (mod 12).',
    source: {
      authors: 'L. Ji, L. Zhu',
      year: 2005,
      title: 'Resolvable Steiner quadruple systems for the last 23 orders',
      where: 'SIAM J. Discrete Math. 19, 420–430',
      part: 'after Hartman 1987',
    },
  },
  {
    id: 'one-factorisations',
    covers: ({ t, k, lambda, resolvable }) => t === 2 && k === 2 && lambda === 1 && resolvable === true,
    exceptions: [],
    statement: 'The complete graph on an even number of points splits into one-factors.',
    source: {
      authors: 'M. Reiss',
      year: 1859,
      title: 'Über eine Steinersche combinatorische Aufgabe',
      where: 'J. reine angew. Math. 56, 326–344',
    },
  },
  {
    id: 'sextuple-pairs',
    covers: ({ t, k, lambda, resolvable }) => t === 2 && k === 6 && lambda === 1 && !resolvable,
    // Undecided orders as the Handbook's table lists them, from memory, with the four that do not exist in front.
    exceptions: [
      16, 21, 36, 46, 51, 61, 81, 166, 226, 231, 256, 261, 286, 316, 321, 346, 351, 376, 406, 411, 436, 441, 471, 501,
      561, 591, 616, 646, 651, 676, 771, 796, 801,
    ],
    statement:
      'A 2-(v,6,1) design exists for every admissible v (v ≡ 1, 6, 16, 21 mod 30) outside a list of undecided orders up to 801.',
    source: {
      authors: 'C. J. Colbourn, J. H. Dinitz (eds)',
      year: 2007,
      title: 'Handbook of Combinatorial Designs, 2nd ed.',
      part: 'II.3, the table of (v,6,1), quoted from memory',
    },
  },
];

/** One rule a spectrum; each asks for the necessary conditions to have been checked before. */
export const spectrumRules: readonly FeasibilityRule[] = spectra.map(
  ({ id, covers, exceptions, statement, source }) => ({
    id: `spectrum-${id}`,
    source,
    grants: (query) => (covers(query) && !exceptions.includes(query.v) ? statement : null),
  }),
);

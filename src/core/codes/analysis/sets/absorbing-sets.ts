import { type Citation, ParamError } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import { type Orbits, tannerOrbits } from '../tanner-orbits.ts';
import { columnWeightProfile } from '../weights.ts';
import { AbsorbingSearch } from './absorbing-search.ts';

export const dolecek2010: Citation = {
  authors: 'L. Dolecek, Z. Zhang, V. Anantharam, M. J. Wainwright, B. Nikolić',
  year: 2010,
  title: 'Analysis of absorbing sets and fully absorbing sets of array-based LDPC codes',
  where: 'IEEE Trans. Inf. Theory 56, 181–201',
  part: 'Section II',
};

/** A class of sets: a bits, b checks that meet them an odd number of times. */
export interface AbsorbingClass {
  a: number;
  b: number;
  /** How many there are in all, symmetry undone; how many were met, for sets larger than `completeTo`. */
  count: number;
  /** How many are fully absorbing: every bit outside, too, has more checks satisfied than not. */
  fullyAbsorbing: number;
  /** Those kept, one or more of each orbit. */
  sets: Uint32Array[];
}

export interface AbsorbingSets {
  /** By a, then b. */
  classes: AbsorbingClass[];
  /** Sets of up to this many bits are listed without a gap; 0 when the budget ended before that of one bit. */
  completeTo: Graded<number>;
  nodes: number;
}

export interface AbsorbingBudget {
  /** Most bits of a set. */
  largest: number;
  /** Most odd checks. */
  oddChecks?: number;
  /** Branches the search may open, some millions a second. */
  nodes: number;
  keep?: number;
  orbits?: Orbits;
  onProgress?(share: number): void;
}

/** Absorbing sets of a matrix whose columns have weights 3 to 5: each bit of the set meets more of its checks an even number
 *  of times than an odd number, so that bit flipping does not leave it. Sets whose bits hang together through common
 *  checks are listed; others are unions of these when their checks do not meet, and are left out. Branch and bound: a bit
 *  with too many odd checks needs another bit on one of any t + 1 of them, t being how many it may have.
 *  @throws ParamError for other column weights. */
export function absorbingSets(H: SparseMatrix, budget: AbsorbingBudget): AbsorbingSets {
  const weights = columnWeightProfile(H).map(([weight]) => weight);
  if (weights.length === 0 || weights[0]! < 3 || weights.at(-1)! > 5)
    throw new ParamError('H', weights.join(', '), 'a matrix whose columns have weights 3 to 5');
  const { largest, nodes, onProgress } = budget;
  if (!Number.isInteger(largest) || largest < 1 || largest > 64)
    throw new ParamError('largest', largest, '1 to 64 bits');
  const orbits = budget.orbits ?? tannerOrbits(H).columns;
  let left = nodes;
  let last: AbsorbingClass[] = [];
  let completeTo = 0;
  for (let a = 1; a <= largest && left > 0; a++) {
    const search = new AbsorbingSearch(H, orbits, { ...budget, largest: a, nodes: left });
    const classes = search.run();
    left -= search.spent;
    if (search.finished) completeTo = a;
    last = [...last, ...classes];
    onProgress?.(a / largest);
  }
  const method = `branch and bound over connected sets, ${nodes - left} branches`;
  return {
    classes: last.sort((x, y) => x.a - y.a || x.b - y.b),
    completeTo: { value: completeTo, grade: 'computed', method, source: dolecek2010 },
    nodes: nodes - left,
  };
}

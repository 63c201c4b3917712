import type { DesignSpec } from '../designs/block-design.ts';
import type { DesignPrediction } from '../designs/family.ts';
import type { Entry, Known } from './entry.ts';

/** The codes that keep 3 … r − 1 of a resolvable 2-(v,k,1) design's r parallel classes, in both orientations. */
export function* keptClassEntries(design: DesignSpec, p: DesignPrediction, maxLength: number): Iterable<Entry> {
  if (!p.resolvable || p.partialLinear || p.t !== 2 || p.lambda !== 1) return;
  const perClass = p.v / p.k;
  const isAffinePlane = p.v === p.k * p.k;
  for (let classes = 3; classes < p.r; classes++) {
    const rank = rankOfClasses(classes, p.k, perClass, isAffinePlane);
    if (p.v <= maxLength) yield entry(design, 'blocks', classes, p.v, classes, p.k, rank);
    if (classes * perClass <= maxLength) yield entry(design, 'points', classes, classes * perClass, p.k, classes, rank);
  }
}

/** With c classes of v/k blocks each, every class sums to the all-one vector, so the rank is at most c·(v/k) − (c − 1).
 *  Blocks of one class are disjoint, so it is at least v/k. For an affine plane of odd order q blocks of different
 *  classes meet in one point: N·Nᵀ = I + (J − I) ⊗ J modulo 2 has rank c·(q − 1) + 1, which meets the upper bound. */
function rankOfClasses(classes: number, k: number, perClass: number, isAffinePlane: boolean): Known {
  const upper = classes * (perClass - 1) + 1;
  if (isAffinePlane && k % 2 === 1)
    return { lower: upper, upper, grade: 'proved', method: 'c(q − 1) + 1, the rank of N·Nᵀ modulo 2' };
  return {
    lower: perClass,
    upper,
    grade: 'bounded',
    method: 'one class below; every class sums to the all-one vector above',
  };
}

function entry(
  design: DesignSpec,
  checks: Entry['checks'],
  keptClasses: number,
  n: number,
  columnWeight: number,
  rowWeight: number,
  rank: Known,
): Entry {
  const most = n - rank.lower + 1;
  const method = `${columnWeight} orthogonal checks on every bit below; Singleton bound above`;
  const lower = Math.min(columnWeight + 1, most);
  return {
    design,
    checks,
    keptClasses,
    n,
    rank,
    girth: { lower: 6, upper: 8, grade: 'bounded', method: 'two points lie on at most one block' },
    distance: { lower, upper: most, grade: 'bounded', method },
    radius: Math.floor(columnWeight / 2),
    radiusGrade: 'proved',
    columnWeight,
    rowWeight,
    structure: 'none',
    resolvable: true,
  };
}

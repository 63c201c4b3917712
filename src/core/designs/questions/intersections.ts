import type { Citation } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';
import { blockIntersections } from '../intersection-numbers.ts';
import { binomial } from '../subset-rank.ts';
import { type DesignOutline, type DesignQuestion, outlineOf } from './question.ts';

/** Pairs of a size of intersection and the number of unordered pairs of blocks that have it, ascending. */
export type IntersectionCounts = [size: number, pairs: number][];

/** How many pairs of blocks meet in how many points: by a theorem where it settles that, else counted. */
export const intersections: DesignQuestion<Graded<IntersectionCounts>> = {
  obstacle: () => null,
  answer(opened, { onProgress }) {
    const outline = outlineOf(opened);
    return (
      bySymmetry(outline) ??
      bySteiner(outline) ??
      bySharedPoints(opened.design.blockPoints, outline) ?? {
        value: [...blockIntersections(opened.design, onProgress)],
        grade: 'computed',
        method: 'every pair of blocks on a common point counted',
      }
    );
  },
};

const RYSER: Citation = {
  authors: 'H. J. Ryser',
  year: 1950,
  title: 'A note on a combinatorial problem',
  where: 'Proc. Amer. Math. Soc. 1, 422–424',
};

/** As many blocks as points, t = 2: any two blocks meet in λ points. */
function bySymmetry({ t, v, b, lambda, holds }: DesignOutline): Graded<IntersectionCounts> | undefined {
  if (!holds || t !== 2 || b !== v) return undefined;
  return {
    value: [[lambda, binomial(b, 2)]],
    grade: 'proved',
    method: 'as many blocks as points: any two blocks meet in λ points',
    source: RYSER,
  };
}

const MENDELSOHN: Citation = {
  authors: 'N. S. Mendelsohn',
  year: 1971,
  title: 'Intersection numbers of t-designs',
  where: 'Studies in Pure Mathematics, Academic Press, 145–150',
};

/** λ = 1: with x_j the blocks that meet a given one in j points, Σ_j C(j,i)·x_j = C(k,i)·(λ_i − 1) for i < t, and no two
 *  blocks share t points; so x_{t−1}, …, x_0 follow one after another and are the same for every block. */
function bySteiner({ t, v, b, k, lambda, holds }: DesignOutline): Graded<IntersectionCounts> | undefined {
  if (!holds || t < 2 || lambda !== 1 || k === null) return undefined;
  const meeting = new Array<number>(t).fill(0);
  for (let i = t - 1; i >= 0; i--) {
    const through = binomial(v - i, t - i) / binomial(k - i, t - i);
    let count = binomial(k, i) * (through - 1);
    for (let j = i + 1; j < t; j++) count -= binomial(j, i) * meeting[j]!;
    meeting[i] = count;
  }
  return {
    value: meeting.map((count, size): [number, number] => [size, (count * b) / 2]).filter(([, pairs]) => pairs > 0),
    grade: 'proved',
    method: 'λ = 1: Mendelsohn’s equations have one solution',
    source: MENDELSOHN,
  };
}

/** No two points on two blocks: two blocks meet in one point or in none, and each point is that of C(r, 2) pairs. */
function bySharedPoints(
  blockPoints: Uint32Array,
  { v, b, partialLinear, holds }: DesignOutline,
): Graded<IntersectionCounts> | undefined {
  if (!holds || !partialLinear) return undefined;
  const on = new Uint32Array(v);
  for (const p of blockPoints) on[p]!++;
  const meeting = on.reduce((sum, r) => sum + (r * (r - 1)) / 2, 0);
  const counts: IntersectionCounts = [
    [0, binomial(b, 2) - meeting],
    [1, meeting],
  ];
  return {
    value: counts.filter(([, pairs]) => pairs > 0),
    grade: 'proved',
    method: 'no two points lie on two blocks, which was verified: pairs of blocks counted at each point',
  };
}

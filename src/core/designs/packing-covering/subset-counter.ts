import { rankOfSubset, type SubsetRanking, subsetRanking } from '../subset-rank.ts';

/** Counts blocks on every t-subset as blocks come and go. */
export class SubsetCounter {
  readonly counts: Uint16Array;
  readonly ranking: SubsetRanking;
  private readonly chosen: number[];

  constructor(v: number, t: number) {
    this.ranking = subsetRanking(v, t);
    this.counts = new Uint16Array(this.ranking.count);
    this.chosen = new Array<number>(t);
  }

  /** Adds a value to the counter of every t-subset of the points, which are ascending. */
  change(points: readonly number[], by: number): void {
    this.forEach(points, (rank) => {
      this.counts[rank]! += by;
      return false;
    });
  }

  /** Whether some t-subset of the points that holds the point x is counted; x need not be among the points. */
  meetsWith(points: readonly number[], x: number): boolean {
    return this.countWith(points, x, (count) => count > 0) > 0;
  }

  /** How many t-subsets made of x and t − 1 of the points have a count that passes the test. */
  countWith(points: readonly number[], x: number, test: (count: number) => boolean): number {
    const { t } = this.ranking;
    let passed = 0;
    const pick = new Array<number>(t - 1);
    const descend = (from: number, depth: number): void => {
      if (depth === t - 1) {
        const subset = [...pick, x].sort((a, b) => a - b);
        if (test(this.counts[rankOfSubset(this.ranking, subset)]!)) passed++;
        return;
      }
      for (let i = from; i < points.length; i++) {
        pick[depth] = points[i]!;
        descend(i + 1, depth + 1);
      }
    };
    descend(0, 0);
    return passed;
  }

  /** Whether the visitor says yes to the number of some t-subset of the points. */
  some(points: readonly number[], visit: (count: number) => boolean): boolean {
    return this.forEach(points, (rank) => visit(this.counts[rank]!));
  }

  private forEach(points: readonly number[], visit: (rank: number) => boolean): boolean {
    const { t } = this.ranking;
    const descend = (from: number, depth: number): boolean => {
      if (depth === t) return visit(rankOfSubset(this.ranking, this.chosen));
      for (let i = from; i <= points.length - (t - depth); i++) {
        this.chosen[depth] = points[i]!;
        if (descend(i + 1, depth + 1)) return true;
      }
      return false;
    };
    return descend(0, 0);
  }
}

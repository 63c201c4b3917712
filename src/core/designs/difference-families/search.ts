import type { SeededRandom } from '../../algebra/seeded-random.ts';

/** A (v,k,λ) family by backtracking with random choices: the least difference not yet covered often enough must lie in
 *  the next block, which grows point by point while no difference is used too often. Restarts after each share of the
 *  budget. Null says only that the budget of nodes is spent.
 *  @param start base blocks already decided, such as the short orbit {0, v/k, …}. */
export function searchFamily(
  v: number,
  k: number,
  lambda: number,
  start: readonly (readonly number[])[],
  random: SeededRandom,
  nodeBudget: number,
): number[][] | null {
  const share = Math.ceil(nodeBudget / 40);
  for (let spent = 0; spent < nodeBudget; spent += share) {
    const attempt = new FamilySearch(v, k, lambda, start, random, share);
    if (attempt.extendFamily()) return [...start.map((b) => [...b]), ...attempt.blocks];
  }
  return null;
}

class FamilySearch {
  readonly blocks: number[][] = [];
  private readonly left: Int32Array;
  private readonly half: number;
  private readonly trial: Uint32Array;
  private nodes = 0;

  constructor(
    private readonly v: number,
    private readonly k: number,
    lambda: number,
    start: readonly (readonly number[])[],
    random: SeededRandom,
    private readonly maxNodes: number,
  ) {
    this.left = new Int32Array(v).fill(lambda);
    this.left[0] = 0;
    // Only short orbits {0, v/k, …} are given: each covers every multiple of v/k once.
    for (const block of start) for (const x of block) if (x !== 0) this.left[x]!--;
    this.half = Math.floor(v / 2);
    this.trial = random.shuffle(Uint32Array.from({ length: v }, (_, x) => x));
  }

  /** Adds blocks until every difference is covered. */
  extendFamily(): boolean {
    let d = 1;
    while (d <= this.half && this.left[d] === 0) d++;
    if (d > this.half) return true;
    if (!this.take([0], d)) return false;
    if (this.extendBlock([0, d], 0)) return true;
    this.release([0], d);
    return false;
  }

  private extendBlock(block: number[], from: number): boolean {
    if (block.length === this.k) {
      this.blocks.push(block);
      if (this.extendFamily()) return true;
      this.blocks.pop();
      return false;
    }
    for (let i = from; i < this.v; i++) {
      if (++this.nodes > this.maxNodes) return false;
      const x = this.trial[i]!;
      if (!this.take(block, x)) continue;
      if (this.extendBlock([...block, x], i + 1)) return true;
      this.release(block, x);
    }
    return false;
  }

  /** Uses up the differences between x and the block, or changes nothing and says no. */
  private take(block: readonly number[], x: number): boolean {
    for (let i = 0; i < block.length; i++) {
      const d = (x - block[i]! + this.v) % this.v;
      this.left[d]!--;
      this.left[this.v - d]!--;
      if (d === 0 || this.left[d]! < 0 || this.left[this.v - d]! < 0) {
        this.release(block.slice(0, i + 1), x);
        return false;
      }
    }
    return true;
  }

  private release(block: readonly number[], x: number): void {
    for (const y of block) {
      const d = (x - y + this.v) % this.v;
      this.left[d]!++;
      this.left[this.v - d]!++;
    }
  }
}

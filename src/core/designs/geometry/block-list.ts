import type { BlockDesign } from '../block-design.ts';

/** Blocks of one size written one after the other into memory sized beforehand.
 *  `finish` asserts that as many came as the theorem says. */
export class BlockList {
  readonly blockPoints: Uint32Array;
  private count = 0;

  constructor(
    private readonly v: number,
    private readonly b: number,
    private readonly k: number,
  ) {
    this.blockPoints = new Uint32Array(b * k);
  }

  get size(): number {
    return this.count;
  }

  /** Adds a block; its points may come in any order. */
  add(points: ArrayLike<number>): void {
    if (this.count === this.b || points.length !== this.k) {
      throw new Error(`block ${this.count} of ${this.b} has ${points.length} points where ${this.k} are due`);
    }
    const block = this.blockPoints.subarray(this.count * this.k, (this.count + 1) * this.k);
    block.set(points);
    if (this.k < 12) sortShort(block);
    else block.sort();
    this.count++;
  }

  finish(extra: Pick<BlockDesign, 'classes' | 'symmetry'> = {}): BlockDesign {
    const { v, b, k, blockPoints } = this;
    if (this.count !== b) throw new Error(`${b} blocks expected, ${this.count} found`);
    const blockStart = new Uint32Array(b + 1);
    for (let i = 0; i <= b; i++) blockStart[i] = i * k;
    return { v, b, blockStart, blockPoints, ...extra };
  }
}

/** Insertion sort: for a handful of points far quicker than the built-in sort of a typed array. */
function sortShort(block: Uint32Array): void {
  for (let i = 1; i < block.length; i++) {
    const x = block[i]!;
    let j = i;
    for (; j > 0 && block[j - 1]! > x; j--) block[j] = block[j - 1]!;
    block[j] = x;
  }
}

import type { BlockDesign } from '../../src/core/designs/block-design.ts';

/** Rank over GF(2) of the incidence matrix, blocks as big integers: plain elimination by highest bit. */
export function plainRank(design: BlockDesign): number {
  const pivots = new Map<number, bigint>();
  for (let i = 0; i < design.b; i++) {
    let row = 0n;
    for (let e = design.blockStart[i]!; e < design.blockStart[i + 1]!; e++) row ^= 1n << BigInt(design.blockPoints[e]!);
    while (row > 0n) {
      const top = row.toString(2).length - 1;
      const pivot = pivots.get(top);
      if (pivot === undefined) {
        pivots.set(top, row);
        break;
      }
      row ^= pivot;
    }
  }
  return pivots.size;
}

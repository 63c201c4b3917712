/** A Steiner 5-design as a union of orbits on GF(q) ∪ {∞}, ∞ the number q = v − 1. */
export interface LinearGroupSystem {
  k: number;
  /** Whether the Frobenius map is taken into the group: PΣL(2,q), not PSL(2,q) alone. */
  semilinear: boolean;
  /** One block of each orbit: each holds 0, 1 and ∞. */
  baseBlocks: readonly (readonly number[])[];
}

/** By number of points. The base blocks were found by exact cover on the orbits of 5-subsets, the method of Denniston
 *  1976 (90 seconds for 84 points); tests/core/designs/geometry repeats the search for the smallest. Nothing rests on
 *  where they come from: the built design is checked subset by subset. */
export const LINEAR_GROUP_SYSTEMS: Readonly<Record<number, LinearGroupSystem>> = {
  24: {
    k: 6,
    semilinear: false,
    baseBlocks: withBase(23, [
      [2, 3, 12],
      [2, 5, 14],
      [3, 7, 10],
    ]),
  },
  28: {
    k: 7,
    semilinear: true,
    baseBlocks: withBase(27, [
      [2, 3, 4, 5],
      [3, 7, 10, 18],
    ]),
  },
  48: {
    k: 6,
    semilinear: false,
    baseBlocks: withBase(47, [
      [2, 3, 9],
      [2, 12, 19],
      [2, 6, 35],
      [2, 13, 26],
      [2, 5, 36],
      [3, 14, 22],
      [3, 11, 43],
      [3, 15, 21],
      [3, 19, 27],
      [4, 13, 15],
      [4, 19, 40],
    ]),
  },
  84: {
    k: 6,
    semilinear: false,
    baseBlocks: withBase(83, [
      [2, 6, 20],
      [2, 3, 8],
      [2, 5, 46],
      [2, 10, 13],
      [2, 9, 22],
      [2, 11, 48],
      [2, 15, 69],
      [2, 12, 14],
      [2, 41, 57],
      [3, 14, 79],
      [3, 7, 46],
      [3, 25, 41],
      [3, 4, 13],
      [3, 18, 64],
      [3, 21, 73],
      [6, 33, 53],
      [5, 16, 45],
      [4, 9, 36],
      [4, 20, 50],
      [3, 19, 76],
      [3, 24, 38],
      [3, 32, 35],
      [3, 22, 69],
      [3, 15, 37],
      [4, 5, 22],
      [3, 11, 12],
      [3, 33, 68],
      [3, 50, 72],
      [4, 15, 66],
    ]),
  },
};

function withBase(infinity: number, others: readonly (readonly number[])[]): readonly (readonly number[])[] {
  return others.map((rest) => [0, 1, ...rest, infinity]);
}

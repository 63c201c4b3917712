/** The two orders ≡ 9 (mod 18) that the general formula does not reach. */
const smallCases: Record<number, [number, number, number][]> = {
  27: [
    [1, 2, 3],
    [4, 7, 11],
    [5, 10, 12],
    [6, 8, 13],
  ],
  45: [
    [1, 2, 3],
    [4, 5, 9],
    [6, 11, 17],
    [7, 16, 22],
    [8, 18, 19],
    [10, 14, 21],
    [12, 13, 20],
  ],
};

/** Difference triples [a, b, c] with a + b = c or a + b + c = v that use every difference 1..(v−1)/2 once, v/3 left
 *  out when v ≡ 3 (mod 6): a solution of Heffter's difference problem, in closed form modulo 18.
 *  Source: R. Peltesohn, Compositio Math. 6 (1939) 251–257. There is none for v = 9.
 *  @param v ≡ 1 or 3 (mod 6), v ≠ 9. */
export function differenceTriples(v: number): [number, number, number][] {
  const small = smallCases[v];
  if (small) return small;
  const s = Math.floor(v / 18);
  const run = (from: number, to: number, triple: (r: number) => [number, number, number]) =>
    Array.from({ length: Math.max(0, to - from + 1) }, (_, i) => triple(from + i));
  switch (v % 18) {
    case 1:
      return [
        ...run(0, s - 1, (r) => [3 * r + 1, 4 * s - r + 1, 4 * s + 2 * r + 2]),
        ...run(0, s - 1, (r) => [3 * r + 2, 8 * s - r, 8 * s + 2 * r + 2]),
        ...run(0, s - 2, (r) => [3 * r + 3, 6 * s - 2 * r - 1, 6 * s + r + 2]),
        [3 * s, 3 * s + 1, 6 * s + 1],
      ];
    case 3:
      return [
        ...run(0, s - 1, (r) => [3 * r + 1, 8 * s - r + 1, 8 * s + 2 * r + 2]),
        ...run(0, s - 1, (r) => [3 * r + 2, 4 * s - r, 4 * s + 2 * r + 2]),
        ...run(0, s - 1, (r) => [3 * r + 3, 6 * s - 2 * r - 1, 6 * s + r + 2]),
      ];
    case 7:
      return [
        ...run(0, s - 1, (r) => [3 * r + 1, 8 * s - r + 3, 8 * s + 2 * r + 4]),
        ...run(0, s - 1, (r) => [3 * r + 2, 6 * s - 2 * r + 1, 6 * s + r + 3]),
        ...run(0, s - 1, (r) => [3 * r + 3, 4 * s - r + 1, 4 * s + 2 * r + 4]),
        [3 * s + 1, 4 * s + 2, 7 * s + 3],
      ];
    case 9:
      return [
        ...run(0, s, (r) => [3 * r + 1, 4 * s - r + 3, 4 * s + 2 * r + 4]),
        ...run(2, s - 2, (r) => [3 * r + 2, 8 * s - r + 2, 8 * s + 2 * r + 4]),
        ...run(1, s - 2, (r) => [3 * r + 3, 6 * s - 2 * r + 1, 6 * s + r + 4]),
        [2, 8 * s + 3, 8 * s + 5],
        [3, 8 * s + 1, 8 * s + 4],
        [5, 8 * s + 2, 8 * s + 7],
        [3 * s - 1, 3 * s + 2, 6 * s + 1],
        [3 * s, 7 * s + 3, 8 * s + 6],
      ];
    case 13:
      return [
        ...run(0, s - 1, (r) => [3 * r + 2, 6 * s - 2 * r + 3, 6 * s + r + 5]),
        ...run(0, s - 1, (r) => [3 * r + 3, 8 * s - r + 5, 8 * s + 2 * r + 8]),
        ...run(0, s, (r) => [3 * r + 1, 4 * s - r + 3, 4 * s + 2 * r + 4]),
        [3 * s + 2, 7 * s + 5, 8 * s + 6],
      ];
    default:
      return [
        ...run(0, s, (r) => [3 * r + 1, 4 * s - r + 3, 4 * s + 2 * r + 4]),
        ...run(0, s, (r) => [3 * r + 2, 8 * s - r + 6, 8 * s + 2 * r + 8]),
        ...run(0, s - 1, (r) => [3 * r + 3, 6 * s - 2 * r + 3, 6 * s + r + 6]),
      ];
  }
}

/** Base blocks {0, a, a + b} of a cyclic triple system and, for v ≡ 3 (mod 6), the short orbit {0, v/3, 2v/3} last. */
export function cyclicBaseTriples(v: number): [number, number, number][] {
  const blocks = differenceTriples(v).map(([a, b]): [number, number, number] => [0, a, a + b]);
  return v % 3 === 0 ? [...blocks, [0, v / 3, (2 * v) / 3]] : blocks;
}

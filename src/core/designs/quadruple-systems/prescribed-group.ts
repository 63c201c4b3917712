import type { SeededRandom } from '../../algebra/seeded-random.ts';
import { searchExactCover } from '../exact-cover.ts';
import { rankOfSubset, type SubsetRanking, subsetOfRank, subsetRanking } from '../subset-rank.ts';

/** A Steiner quadruple system that is a union of orbits of the group the permutations generate, or null when the
 *  budget is spent or no such union exists. Rows of the exact cover are orbits of quadruples, columns orbits of
 *  triples: an orbit O of quadruples covers a triple of orbit U |O|·(triples of U in one quadruple)/|U| times.
 *  Source: E. S. Kramer and D. M. Mesner, Discrete Math. 15 (1976) 263–296. */
export function quadruplesUnderGroup(
  v: number,
  generators: readonly ArrayLike<number>[],
  random: SeededRandom,
  maxNodes: number,
): number[][] | null {
  const triples = orbitsOfSubsets(v, 3, generators);
  const quadruples = orbitsOfSubsets(v, 4, generators);
  const rows: { columns: number[]; orbit: number }[] = [];
  quadruples.members.forEach((orbit, index) => {
    const columns = columnsOf(subsetOfRank(quadruples.ranking, orbit[0]!), orbit.length, triples);
    if (columns) rows.push({ columns, orbit: index });
  });
  const order = random.shuffle(Uint32Array.from({ length: rows.length }, (_, i) => i));
  const shuffled = Array.from(order, (i) => rows[i]!);
  let found: number[][] | null = null;
  searchExactCover(
    triples.members.length,
    shuffled.map((row) => row.columns),
    {
      maxNodes,
      onSolution(chosen) {
        found = chosen.flatMap((r) =>
          Array.from(quadruples.members[shuffled[r]!.orbit]!, (rank) => subsetOfRank(quadruples.ranking, rank)),
        );
        return true;
      },
    },
  );
  return found;
}

interface SubsetOrbits {
  ranking: SubsetRanking;
  /** Orbit of each subset, by rank. */
  orbitOf: Int32Array;
  /** Ranks of the subsets of each orbit. */
  members: Uint32Array[];
}

/** Orbits on subsets of 3 or 4 points. A subset waiting to be moved is packed seven bits a point, so v is below 128. */
function orbitsOfSubsets(v: number, size: number, generators: readonly ArrayLike<number>[]): SubsetOrbits {
  const ranking = subsetRanking(v, size);
  const terms = ranking.terms;
  const orbitOf = new Int32Array(ranking.count).fill(-1);
  const members: Uint32Array[] = [];
  const image = new Int32Array(size);
  const packed = new Int32Array(ranking.count);
  for (let start = 0; start < ranking.count; start++) {
    if (orbitOf[start] !== -1) continue;
    const orbit = [start];
    packed[0] = subsetOfRank(ranking, start).reduce((bits, p, i) => bits | (p << (7 * i)), 0);
    orbitOf[start] = members.length;
    for (let i = 0; i < orbit.length; i++) {
      const points = packed[i]!;
      for (const g of generators) {
        for (let j = 0; j < size; j++) insertAscending(image, j, g[(points >>> (7 * j)) & 127]!);
        let rank = 0;
        let bits = 0;
        for (let j = 0; j < size; j++) {
          rank += terms[j]![image[j]!]!;
          bits |= image[j]! << (7 * j);
        }
        if (orbitOf[rank] !== -1) continue;
        orbitOf[rank] = members.length;
        packed[orbit.length] = bits;
        orbit.push(rank);
      }
    }
    members.push(Uint32Array.from(orbit));
  }
  return { ranking, orbitOf, members };
}

/** Puts x among the first `count` entries, which are ascending. */
function insertAscending(list: Int32Array, count: number, x: number): void {
  let at = count;
  for (; at > 0 && list[at - 1]! > x; at--) list[at] = list[at - 1]!;
  list[at] = x;
}

/** Orbits of triples the orbit of quadruples covers exactly once; null when it covers some triple twice. */
function columnsOf(quadruple: readonly number[], orbitSize: number, triples: SubsetOrbits): number[] | null {
  const within = new Map<number, number>();
  for (let omit = 0; omit < 4; omit++) {
    const u =
      triples.orbitOf[
        rankOfSubset(
          triples.ranking,
          quadruple.filter((_, i) => i !== omit),
        )
      ]!;
    within.set(u, (within.get(u) ?? 0) + 1);
  }
  for (const [u, count] of within) if (orbitSize * count !== triples.members[u]!.length) return null;
  return [...within.keys()];
}

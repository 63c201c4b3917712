import { powerModulo, primitiveRoot } from '../../algebra/integers.ts';
import type { SeededRandom } from '../../algebra/seeded-random.ts';

/** A (p,k,1) family for a prime p ≡ 1 (mod k(k−1)) by Wilson's lemma: when the k(k−1)/2 differences of a block fall
 *  into distinct cosets of the powers of index e = k(k−1)/2, its multiples by representatives of those powers up to
 *  sign form a family. The block is sought at random, so a null says only that the tries are spent.
 *  Source: R. M. Wilson, J. Number Theory 4 (1972) 17–47; for k = 4, 5 see M. Buratti, J. Combin. Des. 3 (1995). */
export function wilsonFamily(p: number, k: number, random: SeededRandom, tries: number): number[][] | null {
  const e = (k * (k - 1)) / 2;
  if ((p - 1) % (2 * e) !== 0) return null;
  const root = primitiveRoot(p);
  const coset = new Uint16Array(p);
  for (let i = 0, x = 1; i < p - 1; i++, x = (x * root) % p) coset[x] = i % e;
  for (let attempt = 0; attempt < tries; attempt++) {
    const block = blockWithSpreadDifferences(p, k, coset, random);
    if (!block) continue;
    const step = powerModulo(root, e, p);
    const family: number[][] = [];
    for (let i = 0, factor = 1; i < (p - 1) / (2 * e); i++, factor = (factor * step) % p) {
      family.push(block.map((x) => (x * factor) % p));
    }
    return family;
  }
  return null;
}

/** One try: 0, 1 and further points, each taken only when its differences open new cosets. */
function blockWithSpreadDifferences(p: number, k: number, coset: Uint16Array, random: SeededRandom): number[] | null {
  const block = [0, 1];
  const taken = new Set([coset[1]!]);
  for (let misses = 0; block.length < k; ) {
    const x = random.below(p);
    const opened = new Set(block.filter((y) => y !== x).map((y) => coset[(x - y + p) % p]!));
    if (opened.size === block.length && [...opened].every((c) => !taken.has(c))) {
      block.push(x);
      for (const c of opened) taken.add(c);
    } else if (++misses > 40) return null;
  }
  return block;
}

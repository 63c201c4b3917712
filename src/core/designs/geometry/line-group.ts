import type { GaloisField } from '../../algebra/galois-field.ts';

/** Every element of PSL(2,q), q odd, as a permutation of GF(q) ∪ {∞}, ∞ being the number q. The array is reused.
 *  x → sx + b with s a square, and x → a − s/(x + c) with s a square, whose determinants are squares. */
export function* specialLineMaps(field: GaloisField): Generator<Uint32Array> {
  const { q, exp } = field;
  const image = new Uint32Array(q + 1);
  const inverse = Uint32Array.from({ length: q }, (_, x) => (x === 0 ? 0 : field.inv(x)));
  for (let e = 0; e < q - 1; e += 2) {
    const s = exp[e]!;
    for (let b = 0; b < q; b++) {
      for (let x = 0; x < q; x++) image[x] = field.add(field.mul(s, x), b);
      image[q] = q;
      yield image;
    }
  }
  for (let e = 0; e < q - 1; e += 2) {
    const s = exp[e]!;
    for (let a = 0; a < q; a++) {
      for (let c = 0; c < q; c++) {
        for (let x = 0; x < q; x++) {
          const shifted = field.add(x, c);
          image[x] = shifted === 0 ? q : field.sub(a, field.mul(s, inverse[shifted]!));
        }
        image[q] = a;
        yield image;
      }
    }
  }
}

/** The members of the subsets' orbits under PSL(2,q), and the Frobenius map too if asked: each member once, as keys that
 *  hold the points in base q + 1, in dictionary order. */
export function orbitKeys(
  field: GaloisField,
  subsets: readonly (readonly number[])[],
  semilinear: boolean,
): Float64Array {
  const { q, p, m } = field;
  const frobenius = (subset: readonly number[]) => subset.map((x) => (x === q ? q : field.pow(x, p)));
  const starts = [...subsets];
  for (let i = subsets.length; semilinear && i < m * subsets.length; i++) {
    starts.push(frobenius(starts[i - subsets.length]!));
  }
  const groupOrder = (q * (q * q - 1)) / 2;
  const keys = new Float64Array(groupOrder * starts.length);
  const points = new Uint32Array(subsets[0]!.length);
  let size = 0;
  for (const map of specialLineMaps(field)) {
    for (const start of starts) {
      for (let i = 0; i < points.length; i++) points[i] = map[start[i]!]!;
      keys[size++] = keyOf(points, q + 1);
    }
  }
  keys.sort();
  let kept = 0; // a stabiliser of order s writes each of its orbit's members s times
  for (let i = 0; i < keys.length; i++) if (i === 0 || keys[i] !== keys[kept - 1]) keys[kept++] = keys[i]!;
  return keys.subarray(0, kept);
}

/** The points sorted and read as digits, the least point first. */
function keyOf(points: Uint32Array, base: number): number {
  for (let i = 1; i < points.length; i++) {
    const x = points[i]!;
    let j = i;
    for (; j > 0 && points[j - 1]! > x; j--) points[j] = points[j - 1]!;
    points[j] = x;
  }
  let key = 0;
  for (const x of points) key = key * base + x;
  return key;
}

/** The points of a key, ascending, written into the target. */
export function pointsOfKey(key: number, base: number, target: Uint32Array): void {
  let rest = key;
  for (let i = target.length - 1; i >= 0; i--) {
    target[i] = rest % base;
    rest = Math.floor(rest / base);
  }
}

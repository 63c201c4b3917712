import type { GaloisField } from '../../src/core/algebra/galois-field.ts';

/** An orbit of k-subsets of the projective line, by its canonical member: one that holds ∞, 0 and 1. */
export interface SubsetOrbit {
  /** The canonical member; ∞ is the number q. */
  subset: number[];
  /** Order of its stabiliser in the group. */
  stabiliser: number;
}

/** Orbits of k-subsets of GF(q) ∪ {∞} under PSL(2,q), or with the Frobenius map PΣL(2,q), where q ≡ 3 (mod 4). Then −1
 *  is no square, and the group carries every 3-subset onto {∞, 0, 1}, three times by PSL(2,q) alone. So the canonical
 *  member is the first in dictionary order of the images that hold these three. */
export class LineSubsetOrbits {
  private readonly isSquare: Uint8Array;

  constructor(
    readonly field: GaloisField,
    readonly semilinear: boolean,
  ) {
    this.isSquare = new Uint8Array(field.q);
    for (let i = 0; i < field.q - 1; i += 2) this.isSquare[field.exp[i]!] = 1;
  }

  /** The canonical member of the subset's orbit and the order of its stabiliser. */
  canonical(subset: readonly number[]): SubsetOrbit {
    let best: number[] = [];
    let stabiliser = 0;
    for (const image of this.imagesThroughBase(subset)) {
      const order = best.length === 0 ? -1 : compare(image, best);
      if (order < 0) [best, stabiliser] = [image, 0];
      if (order <= 0) stabiliser++;
    }
    return { subset: [0, 1, ...best, this.field.q], stabiliser };
  }

  /** All orbits of k-subsets, in dictionary order of their canonical members. */
  orbits(k: number): SubsetOrbit[] {
    const found: SubsetOrbit[] = [];
    const choose = (chosen: number[], from: number) => {
      if (chosen.length === k - 3) {
        const subset = [0, 1, ...chosen, this.field.q];
        const orbit = this.canonical(subset);
        if (compare(orbit.subset, subset) === 0) found.push(orbit);
        return;
      }
      for (let x = from; x < this.field.q; x++) choose([...chosen, x], x + 1);
    };
    choose([], 2);
    return found;
  }

  /** For each group element that carries three points of the subset onto ∞, 0 and 1: the images of the others. */
  private *imagesThroughBase(subset: readonly number[]): Generator<number[]> {
    const frobenius = this.semilinear ? this.field.m : 1;
    for (const a of subset) {
      for (const b of subset) {
        for (const c of subset) {
          if (a === b || b === c || a === c || !this.isSpecial(a, b, c)) continue;
          let image = subset.filter((x) => x !== a && x !== b && x !== c).map((x) => this.crossRatio(a, b, c, x));
          for (let i = 0; i < frobenius; i++) {
            yield image.sort((x, y) => x - y);
            image = image.map((x) => this.field.pow(x, this.field.p));
          }
        }
      }
    }
  }

  /** Whether x → (x−b)(c−a) / ((x−a)(c−b)) has a square as its determinant (c−a)(c−b)(b−a); ∞ drops its factors. */
  private isSpecial(a: number, b: number, c: number): boolean {
    const { sub, mul, neg, q } = this.field;
    if (a === q) return this.isSquare[sub(c, b)] === 1;
    if (b === q) return this.isSquare[sub(a, c)] === 1;
    if (c === q) return this.isSquare[sub(b, a)] === 1;
    return this.isSquare[mul(mul(sub(c, a), sub(c, b)), neg(sub(a, b)))] === 1;
  }

  /** The image of x when a, b, c go to ∞, 0, 1. */
  private crossRatio(a: number, b: number, c: number, x: number): number {
    const { sub, mul, inv, q } = this.field;
    const ratio = (above: number, below: number) => mul(above, inv(below));
    if (a === q) return ratio(sub(x, b), sub(c, b));
    if (b === q) return ratio(sub(c, a), sub(x, a));
    if (c === q) return ratio(sub(x, b), sub(x, a));
    if (x === q) return ratio(sub(c, a), sub(c, b));
    return ratio(mul(sub(x, b), sub(c, a)), mul(sub(x, a), sub(c, b)));
  }
}

function compare(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return 0;
}

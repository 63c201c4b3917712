import { type GaloisField, galoisField, subfieldOf } from '../../algebra/galois-field.ts';
import type { BlockDesign, Symmetry } from '../block-design.ts';
import { BlockList } from './block-list.ts';
import { echelonBases } from './subspaces.ts';

/** The images of GF(q) ∪ {∞} under PGL(2,q^d): an S(3, q+1, q^d+1). Point a is the element a of GF(q^d), point q^d is ∞.
 *  The blocks on ∞ are the lines of AG(d,q); x → a + 1/x carries them to the blocks on a. Each block is listed under
 *  its least point. Source: Witt 1938; Hughes and Piper, Design Theory, section 3.6. */
export function sphericalBlocks(q: number, d: number): BlockDesign {
  const field = galoisField(q ** d);
  const Q = field.q;
  const b = ((Q + 1) * Q * (Q - 1)) / ((q + 1) * q * (q - 1));
  const lines = affineLines(field, q, d);
  const inverse = Uint32Array.from({ length: Q }, (_, x) => (x === 0 ? Q : field.inv(x)));
  const blocks = new BlockList(Q + 1, b, q + 1);
  const block = new Uint32Array(q + 1);
  for (let a = 0; a < Q; a++) {
    block[0] = a;
    for (let line = 0; line < lines.length; line += q) {
      let i = 0;
      for (; i < q; i++) {
        const y = inverse[lines[line + i]!]!;
        const point = y === Q ? Q : field.add(a, y);
        if (point < a) break;
        block[i + 1] = point;
      }
      if (i === q) blocks.add(block);
    }
  }
  return blocks.finish({ symmetry: projectiveLineGenerators(field) });
}

/** Every line of GF(q)^d inside the field, q elements after each other. */
function affineLines(field: GaloisField, q: number, d: number): Uint32Array {
  const scalars = subfieldOf(field, q);
  const basis = Array.from({ length: d }, (_, j) => field.exp[j]!);
  const elements: number[] = [];
  for (const { rows } of echelonBases(q, 1, 0, d - 1)) {
    const row = rows[0]!;
    const direction = basis.reduce((sum, e, j) => field.add(sum, field.mul(scalars[row[j]!]!, e)), 0);
    const seen = new Uint8Array(field.q);
    for (let shift = 0; shift < field.q; shift++) {
      if (seen[shift]) continue;
      for (const s of scalars) {
        const x = field.add(shift, field.mul(s, direction));
        seen[x] = 1;
        elements.push(x);
      }
    }
  }
  return Uint32Array.from(elements);
}

/** x → gx, x → x + 1 and x → −1/x, with ∞ as the point after the field's elements: they generate PGL(2,q) for a prime q,
 *  and a transitive subgroup of PΓL(2,q) for every q. */
export function projectiveLineGenerators(field: GaloisField, multiplier = field.exp[1 % (field.q - 1)]!): Symmetry[] {
  const { q, p } = field;
  const permutation = (image: (x: number) => number) => Uint32Array.from({ length: q + 1 }, (_, x) => image(x));
  let order = 1;
  for (let x = multiplier; x !== 1; x = field.mul(x, multiplier)) order++;
  return [
    { order, pointPerm: permutation((x) => (x === q ? q : field.mul(multiplier, x))) },
    { order: p, pointPerm: permutation((x) => (x === q ? q : field.add(x, 1))) },
    { order: 2, pointPerm: permutation((x) => (x === q ? 0 : x === 0 ? q : field.neg(field.inv(x)))) },
  ];
}

import { type GaloisField, galoisField } from '../../algebra/galois-field.ts';
import type { Symmetry } from '../block-design.ts';
import { collineation } from './collineation.ts';
import type { PolarForm, PolarPoints } from './polar-lines.ts';

/** x0y3 − x3y0 + x1y2 − x2y1 on GF(q)^4, for which every vector is singular: W(q). */
export function symplecticForm(q: number): PolarForm {
  const field = galoisField(q);
  const perp = (x: Uint32Array) => Uint32Array.of(field.neg(x[3]!), field.neg(x[2]!), x[1]!, x[0]!);
  return { field, n: 4, isSingular: () => true, perp };
}

/** Maps of Sp(4,q): a transvection, a torus element, and two of the Weyl group. */
export function symplecticSymmetry({ field }: PolarForm, points: PolarPoints): Symmetry[] {
  const { add, mul, neg, inv, q } = field;
  const g = field.exp[1 % (q - 1)]!;
  return [
    collineation(field, points, (x) => [add(x[0]!, x[3]!), x[1]!, x[2]!, x[3]!]),
    collineation(field, points, (x) => [x[1]!, x[0]!, x[3]!, x[2]!]),
    collineation(field, points, (x) => [x[3]!, x[1]!, x[2]!, neg(x[0]!)]),
    collineation(field, points, (x) => [mul(g, x[0]!), x[1]!, x[2]!, mul(inv(g), x[3]!)]),
  ];
}

/** Maps of the unitary group that permute the coordinates in a cycle, or scale one of them by an element of norm one. */
export function hermitianSymmetry({ field }: PolarForm, points: PolarPoints): Symmetry[] {
  const unit = field.exp[Math.sqrt(field.q) - 1]!;
  return [
    collineation(field, points, (x) => [...x.subarray(1), x[0]!]),
    collineation(field, points, (x) => [field.mul(unit, x[0]!), ...x.subarray(1)]),
  ];
}

/** Maps of G₂(q) that are monomial: a turn of the coordinates 0, 1, 2 with 4, 5, 6, and a torus element. */
export function hexagonSymmetry({ field }: PolarForm, points: PolarPoints): Symmetry[] {
  const g = field.exp[1 % (field.q - 1)]!;
  const turn = [1, 2, 0, 3, 5, 6, 4];
  const scale = [g, field.inv(g), 1, 1, field.inv(g), g, 1];
  return [
    collineation(field, points, (x) => turn.map((i) => x[i]!)),
    collineation(field, points, (x) => scale.map((s, i) => field.mul(s, x[i]!))),
  ];
}

/** Σ x_i^(q+1) on GF(q²)^n: the Hermitian variety H(n−1,q²). */
export function hermitianForm(q: number, n: number): PolarForm {
  const field = galoisField(q * q);
  const norm = Uint32Array.from({ length: q * q }, (_, x) => field.pow(x, q + 1));
  const conjugate = Uint32Array.from({ length: q * q }, (_, x) => field.pow(x, q));
  const isSingular = (x: Uint32Array) => x.reduce((sum, c) => field.add(sum, norm[c]!), 0) === 0;
  return { field, n, isSingular, perp: (x) => x.map((c) => conjugate[c]!) };
}

/** x0x4 + x1x5 + x2x6 − x3² on GF(q)^7: the parabolic quadric Q(6,q). */
export function parabolicForm(q: number): PolarForm {
  const field = galoisField(q);
  const isSingular = (x: Uint32Array) => {
    const pairs = field.add(field.add(field.mul(x[0]!, x[4]!), field.mul(x[1]!, x[5]!)), field.mul(x[2]!, x[6]!));
    return pairs === field.mul(x[3]!, x[3]!);
  };
  const perp = (x: Uint32Array) =>
    Uint32Array.of(x[4]!, x[5]!, x[6]!, field.neg(field.add(x[3]!, x[3]!)), x[0]!, x[1]!, x[2]!);
  return { field, n: 7, isSingular, perp };
}

/** The Grassmann coordinate p_ij of the line through x and y. */
export function grassmann(field: GaloisField, x: Uint32Array, y: Uint32Array, i: number, j: number): number {
  return field.sub(field.mul(x[i]!, y[j]!), field.mul(x[j]!, y[i]!));
}

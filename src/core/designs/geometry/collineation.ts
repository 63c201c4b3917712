import type { GaloisField } from '../../algebra/galois-field.ts';
import type { Symmetry } from '../block-design.ts';
import type { PolarPoints } from './polar-lines.ts';

/** The symmetry that a linear map of the space makes on the points, with its order counted from its cycles.
 *  @throws Error when a point goes to none of the points: the map does not keep the form. */
export function collineation(
  field: GaloisField,
  points: PolarPoints,
  image: (x: Uint32Array) => ArrayLike<number>,
): Symmetry {
  const pointPerm = Uint32Array.from(points.vectors, (x) => {
    const y = Uint32Array.from(image(x));
    const scale = field.inv(y.find((c) => c !== 0)!);
    const point = points.numberOf(y.map((c) => field.mul(scale, c)));
    if (point < 0) throw new Error('the map takes a singular point to one that is not');
    return point;
  });
  return { order: orderOf(pointPerm), pointPerm };
}

/** The least common multiple of the cycle lengths. */
function orderOf(permutation: Uint32Array): number {
  const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));
  const seen = new Uint8Array(permutation.length);
  let order = 1;
  for (let start = 0; start < permutation.length; start++) {
    let length = 0;
    for (let x = start; !seen[x]; x = permutation[x]!, length++) seen[x] = 1;
    if (length > 0) order *= length / divisor(order, length);
  }
  return order;
}

import type { PolarForm, PolarPoints } from '../../src/core/designs/geometry/polar-lines.ts';

/** The plain way to the lines of a polar space: every pair of singular points that `joins`, the whole line through them,
 *  kept when all of it is singular. Lines as sorted lists of point numbers, joined, without repetition. */
export function plainPolarLines(
  { field, isSingular }: PolarForm,
  { vectors, numberOf }: PolarPoints,
  joins: (x: Uint32Array, y: Uint32Array) => boolean = () => true,
): Set<string> {
  const lines = new Set<string>();
  for (const x of vectors) {
    for (const y of vectors) {
      if (x === y || !joins(x, y)) continue;
      const points = [y];
      for (let a = 0; a < field.q; a++) points.push(x.map((c, i) => field.add(c, field.mul(a, y[i]!))));
      if (!points.every(isSingular)) continue;
      const numbers = points.map((point) => numberOf(normalise(point)));
      lines.add(numbers.sort((a, b) => a - b).join());
    }
  }
  return lines;

  function normalise(point: Uint32Array): Uint32Array {
    const scale = field.inv(point.find((c) => c !== 0)!);
    return point.map((c) => field.mul(scale, c));
  }
}

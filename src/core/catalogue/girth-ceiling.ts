import type { PartialLinearCounts } from '../designs/partial-linear-prediction.ts';

/** The longest girth that a Tanner graph of these counts has room for. Below girth g the ball of radius g/2 − 1 round any
 *  vertex is a tree, so both sides must hold its layers (the argument of Moore's bound, here for two degrees; see Biggs,
 *  Algebraic Graph Theory, chapter 23). Every vertex has degree 2 or more, so there is some cycle. */
export function girthCeiling({ v, b, k, r }: PartialLinearCounts): number {
  for (let girth = 6; ; girth += 2) {
    const radius = girth / 2 - 1;
    if (!treeFits(radius, r, k, v, b) || !treeFits(radius, k, r, b, v)) return girth - 2;
  }
}

/** Whether a tree of the radius fits: its even layers among `near` vertices of degree `degree`, its odd ones among `far`. */
function treeFits(radius: number, degree: number, farDegree: number, near: number, far: number): boolean {
  let even = 1;
  let odd = 0;
  let layer = 1;
  for (let d = 1; d <= radius; d++) {
    layer *= d === 1 ? degree : d % 2 === 0 ? farDegree - 1 : degree - 1;
    if (d % 2 === 0) even += layer;
    else odd += layer;
    if (even > near || odd > far) return false;
  }
  return true;
}

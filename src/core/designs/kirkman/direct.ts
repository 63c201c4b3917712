import { galoisField } from '../../algebra/galois-field.ts';

/** A resolved triple system: classes of triples, each class a partition of the points 0..v−1. */
export type ResolvedTriples = number[][][];

/** KTS(3q), q = 6t + 1 a prime power, on GF(q) × Z₃ (x, j numbered x + jq). One base class developed over the field,
 *  and 3t classes, each the translates of one triple with a point on every level.
 *  Source: D. K. Ray-Chaudhuri and R. M. Wilson, Proc. Symp. Pure Math. 19 (1971) 187–203. */
export function kirkmanThreeTimes(q: number): ResolvedTriples {
  const t = (q - 1) / 6;
  const { exp, add } = galoisField(q);
  const power = (e: number) => exp[e % (q - 1)]!;
  const at = (x: number, level: number) => x + level * q;
  const base = [[at(0, 0), at(0, 1), at(0, 2)]];
  const mixed = (e: number) => [at(power(e), 0), at(power(e + 2 * t), 1), at(power(e + 4 * t), 2)];
  for (let i = 0; i < t; i++) {
    for (let j = 0; j < 3; j++) base.push([at(power(i), j), at(power(i + 2 * t), j), at(power(i + 4 * t), j)]);
    for (let m = 0; m < 3; m++) base.push(mixed(i + t + 2 * t * m));
  }
  const translate = (block: number[], s: number) => block.map((p) => at(add(p % q, s), Math.floor(p / q)));
  const field = Array.from({ length: q }, (_, s) => s);
  const classes = field.map((s) => base.map((block) => translate(block, s)));
  for (let i = 0; i < t; i++) {
    for (let m = 0; m < 3; m++) classes.push(field.map((s) => translate(mixed(i + 2 * t * m), s)));
  }
  return classes;
}

/** KTS(2q + 1), q = 6t + 1 a prime power, on GF(q) × {1, 2} and ∞ (numbered 2q). One base class developed over the
 *  field; m is the exponent with 2α^m = α^t + 1. Source: Ray-Chaudhuri and Wilson 1971. */
export function kirkmanTwicePlusOne(q: number): ResolvedTriples {
  const t = (q - 1) / 6;
  const { exp, log, add, mul, inv } = galoisField(q);
  const power = (e: number) => exp[e % (q - 1)]!;
  const m = log[mul(add(power(t), 1), inv(add(1, 1)))]!;
  const base = [[2 * q, 0, q]];
  for (let i = 0; i < t; i++) {
    for (const turn of [0, 2 * t, 4 * t]) {
      const e = i + turn;
      base.push([power(e), power(e + t), q + power(e + m)]);
    }
    base.push([q + power(i + m + t), q + power(i + m + 3 * t), q + power(i + m + 5 * t)]);
  }
  const translate = (p: number, s: number) => (p === 2 * q ? p : p < q ? add(p, s) : q + add(p - q, s));
  return Array.from({ length: q }, (_, s) => base.map((block) => block.map((p) => translate(p, s))));
}

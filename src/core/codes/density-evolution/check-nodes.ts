import type { DegreeFractions } from './edge-degrees.ts';
import { type Density, emptyDensity } from './message-density.ts';

/** What a check does to the density of its incoming messages. */
export type CheckRule = (message: Density, rows: DegreeFractions) => Density;

/** Least magnitude, product of signs, in closed form: above each level the masses with even and with odd sign multiply. */
export const minSumRule: CheckRule = (message, rows) => {
  const { half, mass } = message;
  const out = emptyDensity(half);
  let total = 0;
  let signed = 0;
  let before: [number, number] = [0, 0];
  for (let m = half; m >= 1; m--) {
    total += mass[half + m]! + mass[half - m]!;
    signed += mass[half + m]! - mass[half - m]!;
    const now: [number, number] = [power(rows, total), power(rows, signed)];
    const [both, difference] = [now[0] - before[0], now[1] - before[1]];
    out.mass[half + m] = (both + difference) / 2;
    out.mass[half - m] = (both - difference) / 2;
    before = now;
  }
  out.mass[half] = 1 - before[0];
  return out;
};

const power = (rows: DegreeFractions, x: number) => rows.reduce((sum, [degree, f]) => sum + f * x ** (degree - 1), 0);

/** 2·atanh Π tanh(·/2) on a grid of the step given. Two messages at a time; a result between two levels is split between
 *  them so that the mean of tanh²(·/2) stays, which is the moment that checks multiply (splitting by the ratio itself
 *  would make weak messages look stronger). Messages obey f(−x) = f(x)e^(−x), so magnitudes suffice. */
export function sumProductRule(half: number, step: number): CheckRule {
  const table = boxPlusTable(half, step);
  return (message, rows) => {
    const single = magnitudes(message);
    const powers = new Map<number, Float64Array>([[1, single]]);
    const powerOf = (k: number): Float64Array => {
      const known = powers.get(k);
      if (known) return known;
      const made = combine(powerOf(k >> 1), powerOf(k - (k >> 1)), table);
      powers.set(k, made);
      return made;
    };
    const sum = new Float64Array(half + 1);
    for (const [degree, fraction] of rows) {
      if (degree === 1) sum[half]! += fraction;
      else
        powerOf(degree - 1).forEach((x, m) => {
          sum[m]! += fraction * x;
        });
    }
    return withSigns(sum, step);
  };
}

function magnitudes({ half, mass }: Density): Float64Array {
  return Float64Array.from({ length: half + 1 }, (_, m) => (m === 0 ? mass[half]! : mass[half + m]! + mass[half - m]!));
}

function withSigns(magnitude: Float64Array, step: number): Density {
  const half = magnitude.length - 1;
  const out = emptyDensity(half);
  out.mass[half] = magnitude[0]!;
  for (let m = 1; m <= half; m++) {
    const wrong = 1 / (1 + Math.exp(m * step));
    out.mass[half + m] = magnitude[m]! * (1 - wrong);
    out.mass[half - m] = magnitude[m]! * wrong;
  }
  return out;
}

/** Level below the combination of magnitudes i and j ≤ i, plus the share that goes to the level above. */
function boxPlusTable(half: number, step: number): Float64Array {
  const table = new Float64Array(((half + 1) * (half + 2)) / 2);
  for (let i = 0, at = 0; i <= half; i++) {
    for (let j = 0; j <= i; j++, at++) {
      const [a, b] = [i * step, j * step];
      // min − the soft correction; exact, and without the overflow of tanh and atanh.
      const exact = Math.max(0, b + Math.log1p(Math.exp(-(a + b))) - Math.log1p(Math.exp(-(a - b))));
      const low = Math.min(half, Math.floor(exact / step));
      const share = (moment(exact) - moment(low * step)) / (moment((low + 1) * step) - moment(low * step));
      // At the far end the moment is 1 to the last place; there the share does not matter.
      table[at] = low + (Number.isFinite(share) ? Math.max(0, Math.min(1 - 1e-12, share)) : 0);
    }
  }
  return table;
}

const moment = (ratio: number) => Math.tanh(ratio / 2) ** 2;

function combine(a: Float64Array, b: Float64Array, table: Float64Array): Float64Array {
  const half = a.length - 1;
  const out = new Float64Array(half + 2);
  for (let i = 0, at = 0; i <= half; i++) {
    for (let j = 0; j <= i; j++, at++) {
      const mass = i === j ? a[i]! * b[i]! : a[i]! * b[j]! + a[j]! * b[i]!;
      if (mass < 1e-18) continue;
      const place = table[at]!;
      const low = place | 0;
      const upper = mass * (place - low);
      out[low]! += mass - upper;
      out[low + 1]! += upper;
    }
  }
  return out.subarray(0, half + 1);
}

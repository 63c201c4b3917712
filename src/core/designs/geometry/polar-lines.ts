import type { GaloisField } from '../../algebra/galois-field.ts';

/** A form on GF(Q)^n: which points it keeps, and the hyperplane of the vectors orthogonal to one. */
export interface PolarForm {
  field: GaloisField;
  n: number;
  isSingular(x: Uint32Array): boolean;
  /** Coefficients c with x ⊥ y exactly when Σ c_i y_i = 0. */
  perp(x: Uint32Array): Uint32Array;
}

/** The singular points of the form, normalised to leading coordinate one, and their numbers. */
export interface PolarPoints {
  vectors: Uint32Array[];
  numberOf(x: Uint32Array): number;
}

export function polarPoints(form: PolarForm): PolarPoints {
  const { field, n } = form;
  const { q } = field;
  const before = Uint32Array.from({ length: n }, (_, lead) => (q ** (n - 1 - lead) - 1) / (q - 1));
  const number = new Int32Array((q ** n - 1) / (q - 1)).fill(-1);
  const vectors: Uint32Array[] = [];
  for (let lead = n - 1; lead >= 0; lead--) {
    const x = new Uint32Array(n);
    x[lead] = 1;
    for (let more = true; more; more = countUp(x, lead + 1, q)) {
      if (!form.isSingular(x)) continue;
      number[positionOf(x, q, before)] = vectors.length;
      vectors.push(x.slice());
    }
  }
  return { vectors, numberOf: (x) => number[positionOf(x, q, before)]! };
}

/** Rank of a normalised vector among all of them, those with a later leading coordinate first. `before[lead]` counts the
 *  vectors that lead later. */
function positionOf(x: Uint32Array, q: number, before: Uint32Array): number {
  let lead = 0;
  while (x[lead] === 0) lead++;
  let low = 0;
  for (let i = lead + 1; i < x.length; i++) low = low * q + x[i]!;
  return before[lead]! + low;
}

/** Counts up the coordinates from `first` on in base q, the last one fastest; false when they wrap to zero. */
function countUp(x: Uint32Array, first: number, q: number): boolean {
  for (let i = x.length - 1; i >= first; i--) {
    if (x[i]! < q - 1) {
      x[i]!++;
      return true;
    }
    x[i] = 0;
  }
  return false;
}

/** Every line whose points are all singular, once, as the numbers of its Q + 1 points. A line is met as its reduced
 *  echelon basis (x, y): y leads later than x, and x vanishes where y leads. `accept` may keep some lines only. */
export function forEachPolarLine(
  form: PolarForm,
  points: PolarPoints,
  visit: (line: Uint32Array) => void,
  accept: (x: Uint32Array, y: Uint32Array) => boolean = () => true,
): void {
  const { field, n } = form;
  const line = new Uint32Array(field.q + 1);
  const sum = new Uint32Array(n);
  for (const x of points.vectors) {
    const c = form.perp(x);
    const from = x.indexOf(1) + 1;
    for (let lead = from; lead < n; lead++) {
      if (x[lead] !== 0) continue;
      for (const y of orthogonalVectors(field, c, lead)) {
        if (!form.isSingular(y) || !accept(x, y)) continue;
        line[0] = points.numberOf(y);
        for (let a = 0; a < field.q; a++) {
          for (let i = 0; i < n; i++) sum[i] = field.add(x[i]!, field.mul(a, y[i]!));
          line[a + 1] = points.numberOf(sum);
        }
        visit(line);
      }
    }
  }
}

/** Vectors with leading one at `lead` and Σ c_i y_i = 0; the array is reused. */
function* orthogonalVectors(field: GaloisField, c: Uint32Array, lead: number): Generator<Uint32Array> {
  const n = c.length;
  const y = new Uint32Array(n);
  y[lead] = 1;
  let dependent = n - 1;
  while (dependent > lead && c[dependent] === 0) dependent--;
  if (dependent === lead && c[lead] !== 0) return;
  const solve = dependent > lead ? field.neg(field.inv(c[dependent]!)) : 0;
  for (let more = true; more; more = countUpExcept(y, lead + 1, dependent, field.q)) {
    if (solve !== 0) {
      let sum = 0;
      for (let i = lead; i < n; i++) if (i !== dependent) sum = field.add(sum, field.mul(c[i]!, y[i]!));
      y[dependent] = field.mul(solve, sum);
    }
    yield y;
  }
}

function countUpExcept(y: Uint32Array, first: number, skip: number, q: number): boolean {
  for (let i = y.length - 1; i >= first; i--) {
    if (i === skip) continue;
    if (y[i]! < q - 1) {
      y[i]!++;
      return true;
    }
    y[i] = 0;
  }
  return false;
}

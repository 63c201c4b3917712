import type { GaloisField } from '../algebra/galois-field.ts';

/** A matrix over GF(2^d)[u]/(u^length): entry (r, c) has its coefficients, of u^0 first, from (r·cols + c)·length on. */
export interface SeriesMatrix {
  rows: number;
  cols: number;
  length: number;
  values: Uint32Array;
}

/** Length of the row module: the sum of length − v over the exponents v of the Smith form. Every pivot has the least
 *  valuation of all entries left, so it divides them, and clearing its column leaves a smaller matrix of the same kind.
 *  For length 1 this is the rank over the field. Destroys its argument. */
export function seriesRank(field: GaloisField, matrix: SeriesMatrix): number {
  const { rows, cols, length } = matrix;
  const freeRow = Array.from({ length: rows }, (_, r) => r);
  const freeCol = Array.from({ length: cols }, (_, c) => c);
  let total = 0;
  for (;;) {
    const pivot = leastValuation(matrix, freeRow, freeCol);
    if (!pivot) return total;
    total += length - pivot.valuation;
    const row = freeRow.splice(pivot.row, 1)[0]!;
    const col = freeCol.splice(pivot.col, 1)[0]!;
    clearColumn(field, matrix, { row, col, valuation: pivot.valuation }, freeRow, freeCol);
  }
}

interface Pivot {
  /** Places in the lists of rows and columns left. */
  row: number;
  col: number;
  valuation: number;
}

function leastValuation(
  { cols, length, values }: SeriesMatrix,
  freeRow: readonly number[],
  freeCol: readonly number[],
): Pivot | null {
  let best: Pivot | null = null;
  for (let i = 0; i < freeRow.length; i++) {
    for (let j = 0; j < freeCol.length; j++) {
      const at = (freeRow[i]! * cols + freeCol[j]!) * length;
      const most: number = best?.valuation ?? length;
      let v = 0;
      while (v < most && values[at + v] === 0) v++;
      if (v === most) continue;
      best = { row: i, col: j, valuation: v };
      if (v === 0) return best;
    }
  }
  return best;
}

function clearColumn(
  field: GaloisField,
  { cols, length, values }: SeriesMatrix,
  { row, col, valuation }: Pivot,
  freeRow: readonly number[],
  freeCol: readonly number[],
): void {
  const { exp, log } = field;
  const inverse = inverseSeries(field, values, (row * cols + col) * length + valuation, length - valuation);
  const factor = new Uint32Array(length);
  for (const r of freeRow) {
    const at = (r * cols + col) * length;
    factor.fill(0);
    let zero = true;
    for (let i = valuation; i < length; i++) {
      const a = values[at + i]!;
      if (a === 0) continue;
      zero = false;
      for (let j = 0; i - valuation + j < length - valuation; j++) {
        const b = inverse[j]!;
        if (b !== 0) factor[i - valuation + j]! ^= exp[log[a]! + log[b]!]!;
      }
    }
    if (zero) continue;
    for (const c of freeCol) addProduct(field, values, (r * cols + c) * length, factor, (row * cols + c) * length);
  }
}

/** values[target..] += factor · values[source..], truncated. */
function addProduct(
  { exp, log }: GaloisField,
  values: Uint32Array,
  target: number,
  factor: Uint32Array,
  source: number,
): void {
  const length = factor.length;
  for (let i = 0; i < length; i++) {
    if (factor[i] === 0) continue;
    const scale = log[factor[i]!]!;
    for (let j = 0; i + j < length; j++) {
      const b = values[source + j]!;
      if (b !== 0) values[target + i + j]! ^= exp[scale + log[b]!]!;
    }
  }
}

/** 1/s for a series with a unit in front, coefficient by coefficient. */
function inverseSeries({ exp, log, inv }: GaloisField, values: Uint32Array, at: number, length: number): Uint32Array {
  const result = new Uint32Array(length);
  const lead = inv(values[at]!);
  result[0] = lead;
  for (let i = 1; i < length; i++) {
    let sum = 0;
    for (let j = 1; j <= i; j++) {
      const [a, b] = [values[at + j]!, result[i - j]!];
      if (a !== 0 && b !== 0) sum ^= exp[log[a]! + log[b]!]!;
    }
    result[i] = sum === 0 ? 0 : exp[log[sum]! + log[lead]!]!;
  }
  return result;
}

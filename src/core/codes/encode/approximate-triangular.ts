import { type SeededRandom, seededRandom } from '../../algebra/seeded-random.ts';
import { ParamError } from '../../errors.ts';
import { BitMatrix } from '../../gf2/bit-matrix.ts';
import { nullableInverse } from '../../gf2/inverse.ts';
import { rowOf, type SparseMatrix } from '../sparse-matrix.ts';
import { checkBasis } from './check-basis.ts';
import type { WordEncoder } from './systematic-encoder.ts';
import { type Triangle, triangulate } from './triangulate.ts';

/** An encoder that walks the sparse checks instead of a dense generator (Richardson and Urbanke 2001, "Efficient encoding
 *  of low-density parity-check codes"): rows and columns ordered so that
 *      [ A B T ]   T lower triangular with ones on its diagonal,
 *      [ C D E ]   `gap` rows below it;
 *  then p₁ = φ⁻¹(E T⁻¹A + C)s with φ = E T⁻¹B + D, and p₂ = T⁻¹(A s + B p₁). Time is linear in the ones of the checks, and
 *  quadratic in the gap alone. */
export interface TriangularEncoder extends WordEncoder {
  /** Rows below the triangle. */
  gap: number;
  /** Positions of p₁, in the order of the rows of φ⁻¹, and of p₂, in the order of the triangle. */
  gapPositions: Uint32Array;
  trianglePositions: Uint32Array;
  /** Sums that are formed for one word: the number of terms of each. */
  sums: Uint32Array;
}

/** Orders tried from different starts; the least gap is kept. */
const STARTS = 8;
/** Ones beyond which a single order is tried. */
const ONES_FOR_ALL_STARTS = 50_000;

/** Dependent rows are left out first, so every matrix has this form. φ is made invertible by the choice of p₁ among the
 *  columns outside the triangle.
 *  @throws LimitError when the packed rows do not fit; ParamError on a matrix without rows that say anything. */
export function approximateTriangularEncoder(H: SparseMatrix, seed = 'triangle'): TriangularEncoder {
  const basis = checkBasis(H);
  if (basis.rows === 0) throw new ParamError('H', `${H.rows} × ${H.cols}`, 'a matrix with at least one check');
  const starts = basis.colIndex.length > ONES_FOR_ALL_STARTS ? 1 : STARTS;
  const triangle = leastGap(basis, starts, seededRandom(seed));
  const { gapPositions, inverse } = solveGap(basis, triangle);
  return encoderOf(basis, triangle, gapPositions, inverse);
}

function leastGap(H: SparseMatrix, starts: number, random: SeededRandom): Triangle {
  let best = triangulate(H);
  for (let i = 1; i < starts && best.gapRows.length > 0; i++) {
    const other = triangulate(H, random);
    if (other.gapRows.length < best.gapRows.length) best = other;
  }
  return best;
}

/** The gap's rows with the triangle's columns cleared by its rows from the last up; columns for p₁ are then picked by
 *  elimination, the last ones first, and φ is inverted on them. */
function solveGap(H: SparseMatrix, { rows, pivots, gapRows, outside }: Triangle) {
  const gap = gapRows.length;
  const cleared = new BitMatrix(gap, H.cols);
  gapRows.forEach((r, i) => {
    for (const c of rowOf(H, r)) cleared.flip(i, c);
    for (let t = rows.length - 1; t >= 0; t--) {
      if (cleared.get(i, pivots[t]!)) for (const c of rowOf(H, rows[t]!)) cleared.flip(i, c);
    }
  });
  const gapPositions = pickColumns(cleared, gap, outside);
  const phi = new BitMatrix(gap, gap);
  for (let i = 0; i < gap; i++) for (let j = 0; j < gap; j++) if (cleared.get(i, gapPositions[j]!)) phi.flip(i, j);
  const inverse = nullableInverse(phi);
  if (!inverse) throw new Error('the columns picked for the gap are dependent');
  return { gapPositions, inverse };
}

/** Columns on which the rows have full rank, ascending; those late in `outside` are taken first. */
function pickColumns(cleared: BitMatrix, gap: number, outside: Uint32Array): Uint32Array {
  const work = new BitMatrix(gap, cleared.cols);
  work.words.set(cleared.words);
  const picked: number[] = [];
  const free = Array.from({ length: gap }, (_, i) => i);
  for (let at = outside.length - 1; at >= 0 && free.length > 0; at--) {
    const c = outside[at]!;
    const place = free.findIndex((i) => work.get(i, c));
    if (place < 0) continue;
    const [row] = free.splice(place, 1);
    for (const i of free) if (work.get(i, c)) work.addRow(i, row!);
    picked.push(c);
  }
  return Uint32Array.from(picked).sort();
}

function encoderOf(
  H: SparseMatrix,
  { rows, pivots, gapRows }: Triangle,
  gapPositions: Uint32Array,
  inverse: BitMatrix,
): TriangularEncoder {
  const n = H.cols;
  const gap = gapRows.length;
  const isParity = new Uint8Array(n);
  for (const c of pivots) isParity[c] = 1;
  for (const c of gapPositions) isParity[c] = 1;
  const infoPositions = Uint32Array.from({ length: n }, (_, c) => c).filter((c) => !isParity[c]);
  const k = infoPositions.length;
  const inverseOnes = Array.from({ length: gap }, (_, i) =>
    Uint32Array.from({ length: gap }, (_, j) => j).filter((j) => inverse.get(i, j)),
  );
  const fillTriangle = (word: Uint8Array) => {
    for (let t = 0; t < rows.length; t++) {
      word[pivots[t]!] = 0;
      word[pivots[t]!] = checkSum(H, rows[t]!, word);
    }
  };
  return {
    k,
    infoPositions,
    gap,
    gapPositions,
    trianglePositions: pivots,
    sums: termsOf(H, rows, gapRows, gapPositions, inverseOnes),
    encode(info) {
      if (info.length !== k) throw new ParamError('info', info.length, `${k} information bits`);
      const word = new Uint8Array(n);
      for (let i = 0; i < k; i++) word[infoPositions[i]!] = info[i]! & 1;
      fillTriangle(word);
      if (gap === 0) return word;
      const failing = Uint8Array.from(gapRows, (r) => checkSum(H, r, word));
      inverseOnes.forEach((ones, i) => {
        let sum = 0;
        for (const j of ones) sum ^= failing[j]!;
        word[gapPositions[i]!] = sum;
      });
      fillTriangle(word);
      return word;
    },
  };
}

function checkSum(H: SparseMatrix, row: number, word: Uint8Array): number {
  let sum = 0;
  for (let e = H.rowStart[row]!; e < H.rowStart[row + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
  return sum;
}

/** Terms of T⁻¹A s, of the gap's checks, of φ⁻¹ and of T⁻¹(A s + B p₁), one entry a bit that is formed. */
function termsOf(
  H: SparseMatrix,
  rows: Uint32Array,
  gapRows: Uint32Array,
  gapPositions: Uint32Array,
  inverseOnes: readonly Uint32Array[],
): Uint32Array {
  const inGap = new Set(gapPositions);
  const known = (r: number) => rowOf(H, r).reduce((sum, c) => sum + (inGap.has(c) ? 0 : 1), 0);
  const first = Array.from(rows, (r) => known(r) - 1);
  if (gapRows.length === 0) return Uint32Array.from(first);
  const last = Array.from(rows, (r) => rowOf(H, r).length - 1);
  return Uint32Array.from([
    ...first,
    ...Array.from(gapRows, known),
    ...inverseOnes.map((ones) => ones.length),
    ...last,
  ]);
}

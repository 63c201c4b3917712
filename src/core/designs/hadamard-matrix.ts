import { type GaloisField, galoisField } from '../algebra/galois-field.ts';
import { primePowerOf } from '../algebra/integers.ts';

/** A Hadamard matrix of order n, entries ±1 by rows, first row and column all +1; null where none of these
 *  constructions reaches n: Sylvester 1867 (powers of 2, the Kronecker product), Paley 1933 of both types. */
export function hadamardMatrix(n: number): Int8Array | null {
  const matrix = construct(n);
  return matrix && normalise(matrix, n);
}

/** Whether hadamardMatrix(n) gives one, without building it. */
export function hadamardIsBuilt(n: number): boolean {
  if (n === 1 || n === 2) return true;
  return n % 4 === 0 && (isPaleyOne(n) || isPaleyTwo(n) || splitOf(n) !== 0);
}

const isPaleyOne = (n: number) => (n - 1) % 4 === 3 && primePowerOf(n - 1) !== null;
const isPaleyTwo = (n: number) => (n / 2 - 1) % 4 === 1 && primePowerOf(n / 2 - 1) !== null;

/** The least factor a > 1 such that a and n/a are both built, or 0. */
function splitOf(n: number): number {
  for (let a = 2; a * a <= n; a++) if (n % a === 0 && hadamardIsBuilt(a) && hadamardIsBuilt(n / a)) return a;
  return 0;
}

function construct(n: number): Int8Array | null {
  if (n === 1) return Int8Array.of(1);
  if (n === 2) return Int8Array.of(1, 1, 1, -1);
  if (!hadamardIsBuilt(n)) return null;
  if (Number.isInteger(Math.log2(n))) return kronecker(construct(2)!, 2, construct(n / 2)!, n / 2);
  if (isPaleyOne(n)) return paleyOne(galoisField(n - 1));
  if (isPaleyTwo(n)) return paleyTwo(galoisField(n / 2 - 1));
  const a = splitOf(n);
  return kronecker(construct(a)!, a, construct(n / a)!, n / a);
}

function kronecker(A: Int8Array, a: number, B: Int8Array, b: number): Int8Array {
  const n = a * b;
  const C = new Int8Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      C[i * n + j] = A[Math.floor(i / b) * a + Math.floor(j / b)]! * B[(i % b) * b + (j % b)]!;
    }
  }
  return C;
}

/** Entry (x, y): 1 when x − y is a non-zero square, −1 when it is not a square, 0 when x = y; bordered by ones. */
function conferenceCore(field: GaloisField): (x: number, y: number) => number {
  const { log, sub } = field;
  return (x, y) => (x === y ? 0 : log[sub(x, y)]! % 2 === 0 ? 1 : -1);
}

/** q ≡ 3 (mod 4): I + S with S skew, S = [[0, 1], [−1, Q]]. */
function paleyOne(field: GaloisField): Int8Array {
  const n = field.q + 1;
  const chi = conferenceCore(field);
  return fill(n, (i, j) => {
    if (i === j) return 1;
    if (i === 0) return 1;
    return j === 0 ? -1 : chi(i - 1, j - 1);
  });
}

/** q ≡ 1 (mod 4): C symmetric of order q + 1; C ⊗ [[1,1],[1,−1]] + I ⊗ [[1,−1],[−1,−1]]. */
function paleyTwo(field: GaloisField): Int8Array {
  const chi = conferenceCore(field);
  const entry = (i: number, j: number) => (i === j ? 0 : i === 0 || j === 0 ? 1 : chi(i - 1, j - 1));
  return fill(2 * (field.q + 1), (i, j) => {
    const c = entry(i >> 1, j >> 1);
    if (c === 0) return (i & 1) === 0 && (j & 1) === 0 ? 1 : -1;
    return (i & 1) === 1 && (j & 1) === 1 ? -c : c;
  });
}

function fill(n: number, entry: (i: number, j: number) => number): Int8Array {
  const matrix = new Int8Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) matrix[i * n + j] = entry(i, j);
  return matrix;
}

/** Negates rows and columns until the first of each is all +1. */
function normalise(matrix: Int8Array, n: number): Int8Array {
  for (let j = 0; j < n; j++) {
    if (matrix[j] === -1) for (let i = 0; i < n; i++) matrix[i * n + j] = -matrix[i * n + j]!;
  }
  for (let i = 0; i < n; i++) {
    if (matrix[i * n] === -1) for (let j = 0; j < n; j++) matrix[i * n + j] = -matrix[i * n + j]!;
  }
  return matrix;
}

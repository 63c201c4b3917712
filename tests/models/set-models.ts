import { rowOf, type SparseMatrix, transpose } from '../../src/core/codes/sparse-matrix.ts';

/** Subsets of up to 20 columns, as lists, smallest integers first. */
function* subsetsOf(n: number): Generator<number[]> {
  for (let word = 1; word < 2 ** n; word++) yield Array.from({ length: n }, (_, c) => c).filter((c) => (word >> c) & 1);
}

function degreesOf(H: SparseMatrix, set: readonly number[]): number[] {
  return Array.from({ length: H.rows }, (_, r) => rowOf(H, r).filter((c) => set.includes(c)).length);
}

/** Size and number of the smallest stopping sets, by trying every set; size 0 when there is none. */
export function plainStoppingSets(H: SparseMatrix): { size: number; count: number } {
  let best = { size: 0, count: 0 };
  for (const set of subsetsOf(H.cols)) {
    if (degreesOf(H, set).includes(1)) continue;
    if (best.size === 0 || set.length < best.size) best = { size: set.length, count: 1 };
    else if (set.length === best.size) best.count++;
  }
  return best;
}

/** "a,b" to how many connected absorbing sets there are, and how many of them are fully absorbing, by trying every set. */
export function plainAbsorbingSets(H: SparseMatrix, largest: number): Record<string, [count: number, full: number]> {
  const T = transpose(H);
  const found: Record<string, [number, number]> = {};
  for (const set of subsetsOf(H.cols)) {
    if (set.length > largest) continue;
    const degrees = degreesOf(H, set);
    const content = (c: number) => {
      const checks = Array.from(rowOf(T, c));
      return 2 * checks.filter((r) => degrees[r]! % 2 === 1).length < checks.length;
    };
    if (!set.every(content) || !connected(H, set)) continue;
    const key = `${set.length},${degrees.filter((d) => d % 2 === 1).length}`;
    const [count, full] = found[key] ?? [0, 0];
    const all = Array.from({ length: H.cols }, (_, c) => c).every(content);
    found[key] = [count + 1, full + (all ? 1 : 0)];
  }
  return found;
}

function connected(H: SparseMatrix, set: readonly number[]): boolean {
  const reached = new Set([set[0]!]);
  for (let grown = true; grown; ) {
    grown = false;
    for (let r = 0; r < H.rows; r++) {
      const inside = rowOf(H, r).filter((c) => set.includes(c));
      if (!inside.some((c) => reached.has(c))) continue;
      for (const c of inside) {
        grown ||= !reached.has(c);
        reached.add(c);
      }
    }
  }
  return reached.size === set.length;
}

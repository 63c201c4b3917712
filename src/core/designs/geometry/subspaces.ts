/** Every `dimension`-subspace spanned by the basis vectors numbered from `first` to `last`, each once, as a basis in
 *  reduced echelon form: rows of field elements of GF(q) indexed by coordinate. The arrays are reused between steps. */
export function* echelonBases(q: number, dimension: number, first: number, last: number): Generator<EchelonBasis> {
  for (const pivots of combinations(dimension, first, last)) {
    const rows = pivots.map((pivot) => {
      const row = new Uint32Array(last + 1);
      row[pivot] = 1;
      return row;
    });
    const free = freeEntries(pivots, last);
    const counter = new Uint32Array(free.length);
    for (let more = true; more; more = increment(counter, q)) {
      free.forEach(({ row, column }, i) => {
        rows[row]![column] = counter[i]!;
      });
      yield { pivots, rows };
    }
  }
}

export interface EchelonBasis {
  /** Leading coordinate of each row, ascending. */
  pivots: readonly number[];
  rows: readonly Uint32Array[];
}

/** Coordinates right of a row's pivot that are no pivots themselves. */
function freeEntries(pivots: readonly number[], last: number): { row: number; column: number }[] {
  const free: { row: number; column: number }[] = [];
  pivots.forEach((pivot, row) => {
    for (let column = pivot + 1; column <= last; column++) if (!pivots.includes(column)) free.push({ row, column });
  });
  return free;
}

/** Counts up in base q; false when it wraps to zero. */
export function increment(counter: Uint32Array, q: number): boolean {
  for (let i = 0; i < counter.length; i++) {
    if (counter[i] === q - 1) counter[i] = 0;
    else {
      counter[i]!++;
      return true;
    }
  }
  return false;
}

function* combinations(size: number, first: number, last: number): Generator<number[]> {
  if (size === 0) {
    yield [];
    return;
  }
  for (let head = first; head <= last - size + 1; head++) {
    for (const rest of combinations(size - 1, head + 1, last)) yield [head, ...rest];
  }
}

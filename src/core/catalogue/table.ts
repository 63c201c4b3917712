import type { DesignSpec } from '../designs/block-design.ts';
import { families } from '../designs/families/index.ts';
import type { DesignPrediction } from '../designs/family.ts';
import { type Entry, entryOf } from './entry.ts';
import { keptClassEntries } from './kept-classes.ts';
import { type SortColumn, sortColumns } from './query.ts';

/** Longest code in the catalogue. */
export const MAX_CATALOGUE_LENGTH = 70_000;

/** Every entry with the columns that are filtered and sorted by, laid out for fast scans. */
export interface CatalogueTable {
  entries: readonly Entry[];
  columns: Readonly<Record<SortColumn, Float64Array>>;
  /** Entries in ascending order of a column, ties by length and then as enumerated; made when first asked for. */
  order(column: SortColumn): Uint32Array;
}

let table: CatalogueTable | undefined;

/** The catalogue of everything the families can enumerate, made once. */
export function catalogueTable(): CatalogueTable {
  table ??= makeTable([...allEntries()]);
  return table;
}

function* allEntries(): Iterable<Entry> {
  for (const family of families) {
    for (const params of family.enumerate({ maxPoints: MAX_CATALOGUE_LENGTH, maxBlocks: MAX_CATALOGUE_LENGTH })) {
      const prediction = family.predict(params);
      yield* entriesOf({ family: family.id, params: params as DesignSpec['params'] }, prediction);
    }
  }
}

function* entriesOf(design: DesignSpec, prediction: DesignPrediction): Iterable<Entry> {
  for (const code of prediction.codes) if (code.n <= MAX_CATALOGUE_LENGTH) yield entryOf(design, prediction, code);
  yield* keptClassEntries(design, prediction, MAX_CATALOGUE_LENGTH);
}

const columnValue: Record<SortColumn, (entry: Entry) => number> = {
  n: (e) => e.n,
  k: (e) => e.n - e.rank.upper,
  rate: (e) => 1 - e.rank.upper / e.n,
  girth: (e) => e.girth.lower,
  distance: (e) => e.distance.lower,
  radius: (e) => e.radius,
  columnWeight: (e) => e.columnWeight,
  rowWeight: (e) => e.rowWeight,
  parity: (e) => e.rank.lower,
};

export function makeTable(entries: readonly Entry[]): CatalogueTable {
  const columns = Object.fromEntries(
    sortColumns.map((name) => [name, Float64Array.from(entries, columnValue[name])]),
  ) as Record<SortColumn, Float64Array>;
  const orders = new Map<SortColumn, Uint32Array>();
  const makeOrder = (name: SortColumn) => {
    const values = columns[name];
    const { n } = columns;
    return Uint32Array.from(entries, (_, i) => i).sort((a, b) => values[a]! - values[b]! || n[a]! - n[b]! || a - b);
  };
  return {
    entries,
    columns,
    order(name) {
      const order = orders.get(name) ?? makeOrder(name);
      orders.set(name, order);
      return order;
    },
  };
}

import type { CatalogueColumns } from './columns.ts';
import type { Entry } from './entry.ts';
import type { CatalogueQuery } from './query.ts';
import { parseQuery } from './query.ts';
import { Search } from './search.ts';

/** Candidates of one structure that lie close together: where the first of them is, and how many they are. */
export interface MapCell {
  n: number;
  /** The least that formulas grant. */
  rate: number;
  structure: Entry['structure'];
  count: number;
}

export interface CatalogueMap {
  cells: MapCell[];
  matching: number;
}

/** Places told apart along each axis of the drawing, over the range of what matches. */
const columns = 112;
const rows = 48;

/** Where all matching candidates lie, by length (in equal steps of its logarithm) and least rate; few enough to draw.
 *  @throws ParamError naming the part of the query that is wrong. */
export function mapCatalogue(table: CatalogueColumns, raw: CatalogueQuery): CatalogueMap {
  const search = new Search(table, parseQuery(raw));
  const matching = search.matching();
  const { fit } = search;
  const length = (row: number) => fit.longestLength(row);
  const rate = (row: number) => fit.leastDimension(row) / fit.longestLength(row);
  const placeX = scale(matching, (row) => Math.log(length(row)), columns);
  const placeY = scale(matching, rate, rows);
  const cells = new Map<string, MapCell>();
  for (const row of matching) {
    const structure = table.structureOf(row);
    const key = `${placeX(row)} ${placeY(row)} ${structure}`;
    const cell = cells.get(key);
    if (cell) cell.count++;
    else cells.set(key, { n: length(row), rate: rate(row), structure, count: 1 });
  }
  return { cells: [...cells.values()], matching: matching.length };
}

function scale(matching: Iterable<number>, figure: (row: number) => number, steps: number): (row: number) => number {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const row of matching) {
    const value = figure(row);
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  const width = high - low;
  return (row) => (width > 0 ? Math.min(steps - 1, Math.floor((steps * (figure(row) - low)) / width)) : 0);
}

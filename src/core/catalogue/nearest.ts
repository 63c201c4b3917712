import type { CatalogueColumns } from './columns.ts';
import type { CatalogueQuery } from './query.ts';
import { type Candidate, Search } from './search.ts';

/** What one requirement stands in the way of: the nearest candidate when only that one is given up. */
export interface Nearest {
  /** The requirement given up, e.g. "length" or "rate". */
  givenUp: string;
  direction: 'below' | 'above' | 'other';
  entry: Candidate;
  /** In words: "length 1057, above 1000". */
  words: string;
}

type Figure = (search: Search, row: number) => number;
interface Sided {
  part: keyof CatalogueQuery;
  name: string;
  window(query: CatalogueQuery): { min?: number; max?: number } | undefined;
  value(table: CatalogueColumns): Figure;
}

const fromColumn =
  (name: Parameters<CatalogueColumns['column']>[0]) =>
  (table: CatalogueColumns): Figure => {
    const values = table.column(name);
    return (_, row) => values[row]!;
  };
const exactly = (value: number | undefined) => (value === undefined ? undefined : { min: value, max: value });
const atLeast = (min: number | undefined) => (min === undefined ? undefined : { min });

/** Requirements on a figure, which may be missed on either side. */
const sided: readonly Sided[] = [
  {
    part: 'n',
    name: 'length',
    window: ({ n }) => n,
    value:
      () =>
      ({ fit }, row) =>
        fit.shortestLength(row),
  },
  {
    part: 'k',
    name: 'dimension',
    window: ({ k }) => k,
    value:
      () =>
      ({ fit }, row) =>
        fit.leastDimension(row),
  },
  {
    part: 'rate',
    name: 'rate',
    window: ({ rate }) => rate,
    value:
      () =>
      ({ fit }, row) =>
        fit.leastDimension(row) / fit.longestLength(row),
  },
  { part: 'columnWeight', name: 'column weight', window: (q) => q.columnWeight, value: fromColumn('columnWeight') },
  { part: 'rowWeight', name: 'row weight', window: (q) => q.rowWeight, value: fromColumn('rowWeight') },
  { part: 'girthMin', name: 'girth', window: (q) => atLeast(q.girthMin), value: fromColumn('girthLower') },
  { part: 'distanceMin', name: 'distance', window: (q) => atLeast(q.distanceMin), value: fromColumn('distanceLower') },
  { part: 'radiusMin', name: 'radius', window: (q) => atLeast(q.radiusMin), value: fromColumn('radius') },
  { part: 'parityBits', name: 'parity', window: (q) => exactly(q.parityBits), value: fromColumn('rankUpper') },
  {
    part: 'payloadBits',
    name: 'payload',
    window: (q) => atLeast(q.payloadBits),
    value: (table) => {
      const [n, rank] = [table.column('n'), table.column('rankLower')];
      return (_, row) => n[row]! - rank[row]!;
    },
  },
  { part: 'shortenTo', name: 'length before shortening', window: (q) => atLeast(q.shortenTo), value: fromColumn('n') },
];

/** Requirements without sides: the first candidate when they are given up. */
const others: readonly { parts: readonly (keyof CatalogueQuery)[]; name: string }[] = [
  { parts: ['structure'], name: 'structure' },
  { parts: ['resolvable'], name: 'resolvable' },
  { parts: ['families'], name: 'families' },
  { parts: ['p', 'targetFer'], name: 'frame error rate' },
];

/** For each stated requirement, what comes nearest when it alone is given up, on each side of its window. Meant for
 *  queries that nothing meets. */
export function nearestAlternatives(table: CatalogueColumns, query: CatalogueQuery): Nearest[] {
  const found: Nearest[] = [];
  for (const { part, name, window, value } of sided) {
    const stated = window(query);
    if (!stated) continue;
    const search = new Search(table, { ...query, [part]: undefined });
    const rows = search.matching();
    const figure = value(table);
    for (const direction of ['below', 'above'] as const) {
      const row = nearestRow(rows, (each) => figure(search, each), stated, direction);
      if (row === undefined) continue;
      const end = direction === 'below' ? stated.min : stated.max;
      const words = `${name} ${shown(figure(search, row))}, ${direction} ${end}`;
      found.push({ givenUp: name, direction, entry: search.candidate(row), words });
    }
  }
  for (const { parts, name } of others) {
    if (parts.some((part) => query[part] === undefined)) continue;
    const search = new Search(table, { ...query, ...Object.fromEntries(parts.map((part) => [part, undefined])) });
    const [row] = search.matching();
    if (row !== undefined)
      found.push({
        givenUp: name,
        direction: 'other',
        entry: search.candidate(row),
        words: `without asking for ${name}`,
      });
  }
  return found;
}

/** The row that comes nearest to the window from one side; the first of equals in the order asked for. */
function nearestRow(
  rows: Uint32Array,
  figure: (row: number) => number,
  { min = Number.NEGATIVE_INFINITY, max = Number.POSITIVE_INFINITY }: { min?: number; max?: number },
  direction: 'below' | 'above',
): number | undefined {
  let nearest: number | undefined;
  let least = Number.POSITIVE_INFINITY;
  for (const row of rows) {
    const gap = direction === 'below' ? min - figure(row) : figure(row) - max;
    if (gap > 0 && gap < least) {
      least = gap;
      nearest = row;
    }
  }
  return nearest;
}

const shown = (value: number) => (Number.isInteger(value) ? String(value) : value.toFixed(4));

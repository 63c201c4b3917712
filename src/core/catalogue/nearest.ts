import type { Entry } from './entry.ts';
import type { CatalogueQuery } from './query.ts';
import { type Candidate, candidateOf, matchingEntries } from './search.ts';
import type { CatalogueTable } from './table.ts';
import { testsFor } from './verdict.ts';

/** What one requirement stands in the way of: the nearest entry when only that one is given up. */
export interface Nearest {
  /** The requirement given up, e.g. "length" or "rate". */
  givenUp: string;
  direction: 'below' | 'above' | 'other';
  entry: Candidate;
  /** In words: "n = 1057, above 1000". */
  words: string;
}

type Windowed = 'n' | 'k' | 'rate' | 'columnWeight' | 'rowWeight';
const windows: readonly { part: Windowed; name: string; value: (entry: Entry) => number }[] = [
  { part: 'n', name: 'length', value: ({ n }) => n },
  { part: 'k', name: 'dimension', value: ({ n, rank }) => n - rank.upper },
  { part: 'rate', name: 'rate', value: ({ n, rank }) => 1 - rank.upper / n },
  { part: 'columnWeight', name: 'column weight', value: ({ columnWeight }) => columnWeight },
  { part: 'rowWeight', name: 'row weight', value: ({ rowWeight }) => rowWeight },
];
const floors: readonly {
  part: 'girthMin' | 'distanceMin' | 'radiusMin';
  name: string;
  value: (entry: Entry) => number;
}[] = [
  { part: 'girthMin', name: 'girth', value: ({ girth }) => girth.lower },
  { part: 'distanceMin', name: 'distance', value: ({ distance }) => distance.lower },
  { part: 'radiusMin', name: 'radius', value: ({ radius }) => radius },
];
const others = ['structure', 'resolvable', 'families', 'payloadBits', 'parityBits'] as const;

/** For each stated requirement, what comes nearest when it alone is given up, on each side of its window. Meant for
 *  queries that nothing meets. */
export function nearestAlternatives(table: CatalogueTable, query: CatalogueQuery): Nearest[] {
  const found: Nearest[] = [];
  const tests = testsFor(query);
  const asCandidate = (entry: Entry) => candidateOf(entry, query, tests);
  const without = (part: keyof CatalogueQuery) => matchingEntries(table, { ...query, [part]: undefined });
  for (const { part, name, value } of windows) {
    const window = query[part];
    if (!window) continue;
    const entries = without(part);
    const { min = -Infinity, max = Infinity } = window;
    const below = best(
      entries.filter((entry) => value(entry) < min),
      value,
    );
    const above = best(
      entries.filter((entry) => value(entry) > max),
      (entry) => -value(entry),
    );
    if (below)
      found.push({
        givenUp: name,
        direction: 'below',
        entry: asCandidate(below),
        words: `${name} ${shown(value(below))}, below ${min}`,
      });
    if (above)
      found.push({
        givenUp: name,
        direction: 'above',
        entry: asCandidate(above),
        words: `${name} ${shown(value(above))}, above ${max}`,
      });
  }
  for (const { part, name, value } of floors) {
    if (query[part] === undefined) continue;
    const nearest = best(without(part), value);
    if (nearest)
      found.push({
        givenUp: name,
        direction: 'below',
        entry: asCandidate(nearest),
        words: `${name} ${value(nearest)}, below ${query[part]}`,
      });
  }
  for (const part of others) {
    if (query[part] === undefined) continue;
    const [entry] = without(part);
    if (entry)
      found.push({ givenUp: part, direction: 'other', entry: asCandidate(entry), words: `without asking for ${part}` });
  }
  return found;
}

function best(entries: readonly Entry[], value: (entry: Entry) => number): Entry | undefined {
  return entries.reduce<Entry | undefined>(
    (most, entry) => (most && value(most) >= value(entry) ? most : entry),
    undefined,
  );
}

const shown = (value: number) => (Number.isInteger(value) ? String(value) : value.toFixed(4));

import type { Transform } from '../codes/ldpc.ts';
import type { Entry } from './entry.ts';
import { type CatalogueQuery, parseQuery } from './query.ts';
import { type CatalogueTable, catalogueTable } from './table.ts';
import { testsFor, type Verdict } from './verdict.ts';

/** A code that could be built, with what closed formulas say of it and of each requirement. */
export interface Candidate extends Entry {
  /** Names the candidate in links: family, parameters, orientation, classes kept. */
  id: string;
  transforms: Transform[];
  /** Information positions to drop so that exactly the payload asked for remains; absent when none was asked for. */
  shortenBy?: { lower: number; upper: number };
  verdicts: Verdict[];
}

export interface SearchResult {
  candidates: Candidate[];
  /** Entries that no requirement rules out, and entries in all. */
  matching: number;
  total: number;
}

/** Candidates that no stated requirement rules out, sorted; nothing is built.
 *  @throws ParamError naming the part of the query that is wrong. */
export const searchCatalogue = (query: CatalogueQuery): Candidate[] => searchTable(catalogueTable(), query).candidates;

/** The same with its counts, over any table. */
export function searchTable(table: CatalogueTable, raw: CatalogueQuery): SearchResult {
  const query = parseQuery(raw);
  const matching = matchingEntries(table, query);
  const { offset = 0, limit = 200 } = query;
  const tests = testsFor(query);
  const candidates = matching.slice(offset, offset + limit).map((entry) => candidateOf(entry, query, tests));
  return { candidates, matching: matching.length, total: table.entries.length };
}

/** Entries in the order asked for that no requirement rules out. Windows over plain columns go first, since they are
 *  cheap and leave few entries for the rest. */
export function matchingEntries(table: CatalogueTable, query: CatalogueQuery): Entry[] {
  const order = table.order(query.sort ?? 'n');
  const { n, columnWeight, radius } = table.columns;
  const families = query.families && new Set(query.families);
  const tests = testsFor(query);
  const found: Entry[] = [];
  for (let at = 0; at < order.length; at++) {
    const i = order[query.descending ? order.length - 1 - at : at]!;
    if (n[i]! < (query.n?.min ?? 0) || n[i]! > (query.n?.max ?? Infinity)) continue;
    if (columnWeight[i]! < (query.columnWeight?.min ?? 0) || columnWeight[i]! > (query.columnWeight?.max ?? Infinity))
      continue;
    if (radius[i]! < (query.radiusMin ?? 0)) continue;
    const entry = table.entries[i]!;
    if (families && !families.has(entry.design.family)) continue;
    if (tests.every((test) => test(entry).outcome !== 'misses')) found.push(entry);
  }
  return found;
}

/** An entry as a candidate, with its name, its transforms and a verdict from each test. */
export function candidateOf(
  entry: Entry,
  { payloadBits }: CatalogueQuery,
  tests: readonly ((entry: Entry) => Verdict)[],
): Candidate {
  const { design, checks, keptClasses, n, rank } = entry;
  const params = Object.entries(design.params).map(
    ([name, value]) => `${name}=${typeof value === 'object' ? JSON.stringify(value) : value}`,
  );
  const transforms = keptClasses === undefined ? [] : [{ kind: 'keep-classes', count: keptClasses }];
  return {
    ...entry,
    id: [design.family, ...params, checks, ...(keptClasses === undefined ? [] : [`classes=${keptClasses}`])].join(';'),
    transforms,
    ...(payloadBits !== undefined && {
      shortenBy: { lower: Math.max(0, n - rank.upper - payloadBits), upper: n - rank.lower - payloadBits },
    }),
    verdicts: tests.map((test) => test(entry)),
  };
}

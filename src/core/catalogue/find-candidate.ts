import type { CatalogueColumns } from './columns.ts';
import { type CatalogueQuery, parseQuery } from './query.ts';
import { type Candidate, Search } from './search.ts';

/** The candidate of that name among those that match, with its verdicts; null when none has it.
 *  @throws ParamError naming the part of the query that is wrong. */
export function findCandidate(table: CatalogueColumns, raw: CatalogueQuery, id: string): Candidate | null {
  const search = new Search(table, parseQuery(raw));
  const family = id.split(';', 1)[0]!;
  for (const row of search.matching()) {
    if (table.designOf(row).family !== family) continue;
    const candidate = search.candidate(row);
    if (candidate.id === id) return candidate;
  }
  return null;
}

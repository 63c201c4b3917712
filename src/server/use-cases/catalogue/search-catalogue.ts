import { nearestAlternatives } from '@/core/catalogue/nearest.ts';
import type { CatalogueQuery } from '@/core/catalogue/query.ts';
import { searchTable } from '@/core/catalogue/search.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';

/** One page of what closed formulas allow, and what comes nearest where nothing does. Needs no project: the catalogue is
 *  the same for everybody. */
export function searchCatalogue(query: CatalogueQuery) {
  const table = catalogueTable();
  const { candidates, matching, total } = searchTable(table, query);
  const end = (query.offset ?? 0) + candidates.length;
  const nearest = matching === 0 ? nearestAlternatives(table, query) : [];
  return { candidates, matching, total, nearest, ...(end < matching && { next: end }) };
}

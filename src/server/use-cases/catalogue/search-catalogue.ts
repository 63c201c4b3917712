import { nearestAlternatives } from '@/core/catalogue/nearest.ts';
import { obstaclesTo } from '@/core/catalogue/obstacles.ts';
import type { CatalogueQuery } from '@/core/catalogue/query.ts';
import { searchTable } from '@/core/catalogue/search.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';

/** One page of what closed formulas allow; where nothing does, what comes nearest and the theorems in the way. Needs no project: the catalogue is
 *  the same for everybody. */
export function searchCatalogue(query: CatalogueQuery) {
  const table = catalogueTable();
  const { candidates, matching, total } = searchTable(table, query);
  const end = (query.offset ?? 0) + candidates.length;
  const nearest = matching === 0 ? nearestAlternatives(table, query) : [];
  const obstacles = matching === 0 ? obstaclesTo(query) : [];
  return { candidates, matching, total, nearest, obstacles, ...(end < matching && { next: end }) };
}

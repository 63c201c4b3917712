import { findCandidate as findIn } from '@/core/catalogue/find-candidate.ts';
import type { CatalogueQuery } from '@/core/catalogue/query.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';

/** A candidate that a link names, wherever in the listing it stands. */
export function findCandidate({ id, ...query }: CatalogueQuery & { id: string }) {
  return { candidate: findIn(catalogueTable(), query, id) };
}

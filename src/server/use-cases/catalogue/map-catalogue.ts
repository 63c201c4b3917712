import { mapCatalogue as mapTable } from '@/core/catalogue/map.ts';
import type { CatalogueQuery } from '@/core/catalogue/query.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';

/** Where everything that matches lies, for the scatter. */
export const mapCatalogue = (query: CatalogueQuery) => mapTable(catalogueTable(), query);

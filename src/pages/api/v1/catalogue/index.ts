import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { searchCatalogue } from '@/server/use-cases/catalogue/search-catalogue.ts';

export const GET = handle(endpoints.searchCatalogue, async ({ query }) => searchCatalogue(query));
export const ALL = methodNotAllowed('GET');

import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { mapCatalogue } from '@/server/use-cases/catalogue/map-catalogue.ts';

export const GET = handle(endpoints.mapCatalogue, async ({ query }) => mapCatalogue(query));
export const ALL = methodNotAllowed('GET');

import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { findCandidate } from '@/server/use-cases/catalogue/find-candidate.ts';

export const GET = handle(endpoints.findCandidate, async ({ query }) => findCandidate(query));
export const ALL = methodNotAllowed('GET');

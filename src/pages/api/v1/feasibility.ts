import { endpoints } from '@/api/endpoints.ts';
import { feasibility } from '@/core/designs/feasibility/feasibility.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';

export const POST = handle(endpoints.feasibility, async ({ body }) => feasibility(body));
export const ALL = methodNotAllowed('POST');

import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getRequirements } from '@/server/use-cases/requirements/get-requirements.ts';
import { putRequirements } from '@/server/use-cases/requirements/put-requirements.ts';

export const GET = handle(endpoints.getRequirements, (call) => getRequirements(call, call.params.id));

export const PUT = handle(endpoints.putRequirements, (call) => putRequirements(call, call.params.id, call.body));

export const ALL = methodNotAllowed('GET', 'PUT');

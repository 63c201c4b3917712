import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { fleetState } from '@/server/use-cases/fleet/fleet-state.ts';

export const GET = handle(endpoints.getFleet, () => fleetState());

export const ALL = methodNotAllowed('GET');

import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { projectPoints } from '@/server/use-cases/runs/project-points.ts';

export const GET = handle(endpoints.projectPoints, (call) => projectPoints(call, call.params.id, call.query));

export const ALL = methodNotAllowed('GET');

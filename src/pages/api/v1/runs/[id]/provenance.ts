import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { runProvenance } from '@/server/use-cases/runs/run-provenance.ts';

export const GET = handle(endpoints.runProvenance, (call) => runProvenance(call, call.params.id, call.query.pointId));

export const ALL = methodNotAllowed('GET');

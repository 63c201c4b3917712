import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { failShards } from '@/server/use-cases/runs/fail-shards.ts';

export const POST = handle(endpoints.failShards, (call) => failShards(call, call.params.id, call.body));

export const ALL = methodNotAllowed('POST');

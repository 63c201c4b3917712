import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';

export const POST = handle(endpoints.leaseShards, (call) => leaseShards(call, call.params.id, call.body));

export const ALL = methodNotAllowed('POST');

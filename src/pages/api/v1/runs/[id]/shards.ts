import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';

// Room for 500 tallies with histograms of 1000 entries.
const bodyLimitBytes = 8 * 1024 * 1024;

export const POST = handle(endpoints.postShards, (call) => postShards(call, call.params.id, call.body), {
  bodyLimitBytes,
});

export const ALL = methodNotAllowed('POST');

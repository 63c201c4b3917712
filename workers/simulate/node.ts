import type { ShardAnswer, ShardTask } from './api.ts';
import { createSimulateApi } from './simulate.ts';

const api = createSimulateApi();

/** One task of a pool of worker threads. The matrix of a task lies in shared memory, so that stating it with every one
 *  costs nothing. */
export default async function shard({ key, spec, options, index }: ShardTask): Promise<ShardAnswer> {
  const answer = await api.shard(key, index);
  if (answer.ok || answer.failure.code !== 'unknown-spec') return answer;
  api.load(key, spec, options);
  return api.shard(key, index);
}

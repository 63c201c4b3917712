import type { NewCode } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { pause } from '@/client/pause.ts';

const POLL_MS = 700;

/** Keeps a code in a project; answers with its id. A code that takes the server long is waited for.
 *  @throws ApiFailure as the server refuses; Error with the server's reason when its own build fails. */
export async function keepCode(projectId: string, body: NewCode, signal: AbortSignal): Promise<string> {
  const answer = await call(endpoints.createCode, { params: { id: projectId }, body, signal });
  if ('code' in answer) return answer.code.id;
  let { job } = answer;
  while (job.state === 'waiting' || job.state === 'working') {
    await pause(POLL_MS, signal);
    ({ job } = await call(endpoints.getJob, { params: { id: job.id }, signal }));
  }
  if (job.state === 'failed' || !job.codeId) throw new Error(job.error?.message ?? 'The server could not build it.');
  return job.codeId;
}

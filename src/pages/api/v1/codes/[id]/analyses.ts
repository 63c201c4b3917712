import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed, Reply } from '@/server/http/handle.ts';
import { examinePool } from '@/server/jobs/examine-pool.ts';
import { listAnalyses } from '@/server/use-cases/analyses/get-analysis.ts';
import { startAnalysis } from '@/server/use-cases/analyses/start-analysis.ts';

export const GET = handle(endpoints.listAnalyses, async (call) => ({
  analyses: await listAnalyses(call, call.params.id),
}));

export const POST = handle(endpoints.startAnalysis, async (call) => {
  const analysis = await startAnalysis(call, examinePool(), call.params.id, call.body);
  return analysis.state === 'working' ? new Reply(202, { analysis }) : { analysis };
});

export const ALL = methodNotAllowed('GET', 'POST');

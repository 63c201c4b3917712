import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { cancelAnalysis } from '@/server/use-cases/analyses/cancel-analysis.ts';
import { getAnalysis } from '@/server/use-cases/analyses/get-analysis.ts';

export const GET = handle(endpoints.getAnalysis, async (call) => ({
  analysis: await getAnalysis(call, call.params.id),
}));

export const DELETE = handle(endpoints.cancelAnalysis, async (call) => {
  await cancelAnalysis(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('GET', 'DELETE');

import { type Context, nowText } from '../../context.ts';
import { endAnalysis } from '../../repositories/analyses.ts';
import { codeToWrite } from '../codes/get-code.ts';
import { getAnalysis } from './get-analysis.ts';
import { abortAnalysis } from './open-analyses.ts';

/** Ends an analysis that still works, and its worker with it; one that has ended stays as it is. */
export async function cancelAnalysis(context: Context, id: string): Promise<void> {
  const { codeId } = await getAnalysis(context, id);
  await codeToWrite(context, codeId);
  abortAnalysis(id);
  await endAnalysis(context.db, id, { state: 'cancelled' }, nowText());
}

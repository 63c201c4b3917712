import { setTimeout as delay } from 'node:timers/promises';
import type { Analysis, NewAnalysis } from '@/api/analyses.ts';
import type { Code } from '@/api/codes.ts';
import type { AnalysableCode } from '@/core/codes/analyse-ldpc.ts';
import { questionCards } from '@/core/codes/questions/cards.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { type Context, nowText } from '../../context.ts';
import { newId } from '../../ids.ts';
import type { ExaminePool } from '../../jobs/examine-pool.ts';
import { Refusal } from '../../refusal.ts';
import { insertAnalysis, workingAnalysis } from '../../repositories/analyses.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { refuseWords } from '../codes/constant-weight.ts';
import { codeToWrite } from '../codes/get-code.ts';
import { finishAnalysis } from './finish-analysis.ts';
import { getAnalysis } from './get-analysis.ts';
import { openAnalysis } from './open-analyses.ts';

// As with codes, what takes over a second goes on by itself.
const patienceMs = 900;

/** Asks more of a kept code in a worker of the server; what it tells is kept with the code where it is more than was known.
 *  @throws Refusal when the question does not fit the code, or is being worked on already. */
export async function startAnalysis(
  context: Context,
  pool: ExaminePool,
  codeId: string,
  { question, seconds }: NewAnalysis,
): Promise<Analysis> {
  const code = await codeToWrite(context, codeId);
  refuseWords(code, 'analysis of them');
  const obstacle = questionCards[question].obstacle(code);
  if (obstacle) throw new Refusal('param', `question: ${obstacle}.`, { fields: { question: obstacle } });
  const { db, caller } = context;
  const existing = await workingAnalysis(db, codeId, question);
  if (existing)
    throw new Refusal('conflict', 'This is being worked on already; wait for it, or cancel it.', { existing });
  const id = newId();
  await insertAnalysis(db, { id, codeId, question, seconds, createdBy: caller.id, createdAt: nowText() });
  const open = openAnalysis(id);
  const H = (await matrixOf(db, codeId))!;
  const request = { question, code: analysable(code, H), seconds };
  const onPart = (share: number) => {
    open.share = share;
  };
  const answering = pool.run(request, { signal: open.controller.signal, onPart });
  const finished = finishAnalysis(db, { id, codeId, question, userId: caller.id }, answering);
  await Promise.race([finished, delay(patienceMs)]);
  return getAnalysis(context, id);
}

/** The matrix with where it came from, as far as that lets theorems speak. */
function analysable({ design, derivation }: Code, H: AnalysableCode['H']): AnalysableCode {
  if (derivation.kind !== 'ldpc' || design.family === 'uploaded') return { H };
  return { H, design: design as DesignSpec, checks: derivation.checks, transforms: derivation.transforms ?? [] };
}

import type { ExamineAnswer } from '@workers/examine/api.ts';
import type { Analysis } from '@/api/analyses.ts';
import { mergeLines } from '@/core/codes/questions/merge-lines.ts';
import type { CodeAnswer } from '@/core/codes/questions/question.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import { nowText } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { refusalOfFailure } from '../../jobs/worker-refusal.ts';
import { Refusal } from '../../refusal.ts';
import { endAnalysis, isAnswered } from '../../repositories/analyses.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeById, updateProperties } from '../../repositories/codes.ts';
import { closeAnalysis } from './open-analyses.ts';

interface Asked {
  id: string;
  codeId: string;
  question: CodeQuestionId;
  userId: string;
}

/** Waits for an answer and keeps it, or records why there is none. Never throws: an end that cannot be recorded now leaves
 *  the analysis open, and the next start fails it. */
export async function finishAnalysis(db: Database, asked: Asked, answering: Promise<ExamineAnswer>): Promise<void> {
  try {
    const answer = await answering;
    if (!answer.ok) throw refusalOfFailure(answer.failure);
    await keepAnswer(db, asked, answer.answer, answer.elapsedMs);
  } catch (error) {
    await endBadly(db, asked.id, error).catch((failure) => console.error(`Analysis ${asked.id}:`, failure));
  } finally {
    closeAnalysis(asked.id);
  }
}

/** Merges what was told into the code's lines; an answer that told nothing new leaves them, and is not kept itself. */
async function keepAnswer(db: Database, asked: Asked, answer: CodeAnswer, elapsedMs: number): Promise<void> {
  const { id, question, userId } = asked;
  await inTransaction(db, async (trx) => {
    // Somebody may have removed the code meanwhile, and its analyses with it.
    const code = await codeById(trx, asked.codeId);
    if (!code) return;
    const timed = answer.lines.map((line, at) => (at === 0 ? { ...line, elapsedMs } : line));
    const { lines, improved } = mergeLines(code.properties, timed);
    const tellsMore = improved.length > 0 || !(await isAnswered(trx, code.id, question));
    const kept = tellsMore ? { ...answer, lines: timed } : null;
    const ended = await endAnalysis(trx, id, { state: 'done', answer: kept, improved, elapsedMs }, nowText());
    if (!ended || improved.length === 0) return;
    await updateProperties(trx, code.id, lines);
    const { projectId } = code;
    const content = { question, improved };
    await recordEvent(trx, { id: userId }, { projectId, kind: 'code.analysed', subject: code.id, content });
  });
}

async function endBadly(db: Database, id: string, error: unknown): Promise<void> {
  const isAbort = error instanceof Error && error.name === 'AbortError';
  const end = isAbort ? { state: 'cancelled' as const } : { state: 'failed' as const, error: errorOf(id, error) };
  await endAnalysis(db, id, end, nowText());
}

function errorOf(id: string, error: unknown): NonNullable<Analysis['error']> {
  if (error instanceof Refusal) return { code: error.code, message: error.message };
  console.error(`Analysis ${id}:`, error);
  return { code: 'internal', message: 'The analysis failed by a fault of the program; it has been logged.' };
}

import type { Analysis } from '@/api/analyses.ts';
import type { CodeAnswer } from '@/core/codes/questions/question.ts';
import type { Database } from '../db/database.ts';
import type { Row } from './row.ts';

export type StoredAnalysis = Omit<Analysis, 'share'>;

export interface NewAnalysisRow extends Pick<Analysis, 'id' | 'codeId' | 'question' | 'seconds' | 'createdAt'> {
  createdBy: string;
}

export async function insertAnalysis(db: Database, row: NewAnalysisRow): Promise<void> {
  await db('analyses').insert({
    id: row.id,
    code_id: row.codeId,
    question: row.question,
    seconds: row.seconds,
    state: 'working',
    created_by: row.createdBy,
    created_at: row.createdAt,
  });
}

const shown = (db: Database) =>
  db('analyses').join('users', 'users.id', 'analyses.created_by').select('analyses.*', 'users.name as author');

/** Analyses of a code, newest first. */
export async function analysesOf(db: Database, codeId: string): Promise<StoredAnalysis[]> {
  return (await shown(db).where({ code_id: codeId }).orderBy('analyses.id', 'desc').limit(200)).map(toAnalysis);
}

export async function analysisById(db: Database, id: string): Promise<StoredAnalysis | undefined> {
  const row = await shown(db).where('analyses.id', id).first();
  return row && toAnalysis(row);
}

export async function workingAnalysis(db: Database, codeId: string, question: string): Promise<string | undefined> {
  const row = await db('analyses').where({ code_id: codeId, question, state: 'working' }).first('id');
  return row?.id;
}

/** The sets or words that an analysis found, as a file. */
export async function analysisList(db: Database, id: string): Promise<CodeAnswer['list']> {
  const row = await db('analyses').where({ id }).first('answer');
  return row?.answer ? (JSON.parse(row.answer) as CodeAnswer).list : undefined;
}

export type AnalysisEnd =
  | { state: 'done'; answer: CodeAnswer | null; improved: string[]; elapsedMs: number }
  | { state: 'failed'; error: NonNullable<Analysis['error']> }
  | { state: 'cancelled' };

/** Ends an analysis that still works; one that has ended stays as it is. Says whether it did. */
export async function endAnalysis(db: Database, id: string, end: AnalysisEnd, at: string): Promise<boolean> {
  const changed = await db('analyses')
    .where({ id, state: 'working' })
    .update({ ...columnsOf(end), state: end.state, ended_at: at });
  return changed > 0;
}

function columnsOf(end: AnalysisEnd): Record<string, string | number | null> {
  switch (end.state) {
    case 'done':
      return {
        answer: end.answer && JSON.stringify(end.answer),
        improved: JSON.stringify(end.improved),
        elapsed_ms: end.elapsedMs,
      };
    case 'failed':
      return { error: JSON.stringify(end.error) };
    case 'cancelled':
      return {};
  }
}

/** Whether an analysis told something of this question already. */
export async function isAnswered(db: Database, codeId: string, question: string): Promise<boolean> {
  const row = await db('analyses').where({ code_id: codeId, question }).whereNotNull('answer').first('id');
  return row !== undefined;
}

export async function failOpenAnalyses(db: Database, error: NonNullable<Analysis['error']>, at: string): Promise<void> {
  await db('analyses')
    .where({ state: 'working' })
    .update({ state: 'failed', error: JSON.stringify(error), ended_at: at });
}

function toAnalysis(row: Row): StoredAnalysis {
  const answer = row.answer ? (JSON.parse(row.answer) as CodeAnswer) : null;
  return {
    id: row.id!,
    codeId: row.code_id!,
    question: row.question!,
    seconds: row.seconds!,
    state: row.state!,
    lines: answer?.lines ?? [],
    histogram: answer?.histogram ?? null,
    table: answer?.table ?? null,
    improved: JSON.parse(row.improved!),
    listName: answer?.list?.fileName ?? null,
    error: row.error ? JSON.parse(row.error) : null,
    elapsedMs: row.elapsed_ms!,
    createdBy: row.author!,
    createdAt: row.created_at!,
  };
}

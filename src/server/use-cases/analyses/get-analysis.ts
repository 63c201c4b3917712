import type { Analysis } from '@/api/analyses.ts';
import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { analysesOf, analysisById, analysisList, type StoredAnalysis } from '../../repositories/analyses.ts';
import { getCode } from '../codes/get-code.ts';
import { shareOf } from './open-analyses.ts';

const shown = (analysis: StoredAnalysis): Analysis => ({ ...analysis, share: shareOf(analysis.id) });

/** An analysis of a code that the caller may see. */
export async function getAnalysis(context: Context, id: string): Promise<Analysis> {
  const analysis = isId(id) ? await analysisById(context.db, id) : undefined;
  if (!analysis) throw notFound('analysis');
  await getCode(context, analysis.codeId);
  return shown(analysis);
}

/** Analyses of a code, newest first. */
export async function listAnalyses(context: Context, codeId: string): Promise<Analysis[]> {
  await getCode(context, codeId);
  return (await analysesOf(context.db, codeId)).map(shown);
}

/** The sets or words that an analysis found. */
export async function getAnalysisList(context: Context, id: string) {
  await getAnalysis(context, id);
  const list = await analysisList(context.db, id);
  if (!list) throw notFound('list');
  return { bytes: new TextEncoder().encode(list.text), fileName: list.fileName, mediaType: 'text/csv' };
}

import type { Code } from '@/api/codes.ts';
import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { codeById } from '../../repositories/codes.ts';
import { projectToRead, projectToWrite } from '../rights.ts';

/** A code of a project that the caller belongs to. */
export async function getCode(context: Context, codeId: string): Promise<Code> {
  const code = isId(codeId) ? await codeById(context.db, codeId) : undefined;
  if (!code) throw notFound('code');
  await projectToRead(context, code.projectId, 'code');
  return code;
}

/** A code that the caller may change. */
export async function codeToWrite(context: Context, codeId: string): Promise<Code> {
  const code = await getCode(context, codeId);
  await projectToWrite(context, code.projectId, 'code');
  return code;
}

import { isDeepStrictEqual } from 'node:util';
import type { Code } from '@/api/codes.ts';
import type { Context } from '../../context.ts';
import { codesOfDesign } from '../../repositories/codes.ts';
import { projectToRead } from '../rights.ts';

/** The kept code at a step of another's lineage. */
export interface KeptStep {
  id: string;
  name: string;
}

/** For the matrix before any transform and after each one but the last, the code that the project keeps of it, or null. */
export async function findLineage(
  context: Context,
  { projectId, design, derivation }: Pick<Code, 'projectId' | 'design' | 'derivation'>,
): Promise<(KeptStep | null)[]> {
  await projectToRead(context, projectId);
  if (derivation.kind !== 'ldpc' || !derivation.transforms?.length) return [];
  const { checks, transforms } = derivation;
  const kept = await codesOfDesign(context.db, projectId, design);
  return transforms.map((_, steps) => {
    const found = kept.find(
      (code) =>
        code.derivation.kind === 'ldpc' &&
        code.derivation.checks === checks &&
        isDeepStrictEqual(code.derivation.transforms ?? [], transforms.slice(0, steps)),
    );
    return found ? { id: found.id, name: found.name } : null;
  });
}

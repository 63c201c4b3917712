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

type Derivation = Code['derivation'];

/** For the matrix before any transform and after each one but the last, the code that the project keeps of it, or null. */
export async function findLineage(
  context: Context,
  { projectId, design, derivation }: Pick<Code, 'projectId' | 'design' | 'derivation'>,
): Promise<(KeptStep | null)[]> {
  await projectToRead(context, projectId);
  const transforms = stepsOf(derivation);
  if (transforms.length === 0) return [];
  const kept = await codesOfDesign(context.db, projectId, design);
  return transforms.map((_, count) => {
    const steps = transforms.slice(0, count);
    const found = kept.find((code) => isAtStep(code, derivation, steps));
    return found ? { id: found.id, name: found.name } : null;
  });
}

const stepsOf = (derivation: Derivation) =>
  derivation.kind === 'ldpc' || derivation.kind === 'stored' ? (derivation.transforms ?? []) : [];

/** Whether a code came by these steps from where the derivation begins. */
function isAtStep(
  { fingerprint, design, derivation: other }: Pick<Code, 'fingerprint' | 'design' | 'derivation'>,
  derivation: Derivation,
  steps: readonly unknown[],
): boolean {
  if (derivation.kind === 'stored') {
    if (steps.length === 0) return design.family === 'uploaded' && fingerprint === derivation.base;
    return other.kind === 'stored' && other.base === derivation.base && isDeepStrictEqual(other.transforms, steps);
  }
  return (
    derivation.kind === 'ldpc' &&
    other.kind === 'ldpc' &&
    other.checks === derivation.checks &&
    isDeepStrictEqual(other.transforms ?? [], steps)
  );
}

import type { Code } from '@/api/codes.ts';
import { matrixOf } from '@/client/code-matrix.ts';
import type { SheetRequest } from '@/core/codes/sheet.ts';
import type { BuildPlan } from '../new/use-build.ts';

export type Transformed = Pick<
  Code,
  'id' | 'fingerprint' | 'projectId' | 'design' | 'designTitle' | 'derivation' | 'name'
>;

/** Whether a code's steps begin at an uploaded matrix, which no construction gives anew. */
export const beginsAtUpload = ({ design }: Pick<Code, 'design'>): boolean => design.family === 'uploaded';

/** One more step from a code; null for words, which have no checks. From a construction all is built again; from an upload the
 *  matrix kept is taken on, while the server goes all the steps from the upload. */
export function nextStep(code: Transformed, step: { kind: string }): BuildPlan | null {
  const { design, designTitle, derivation, fingerprint } = code;
  if (derivation.kind === 'constant-weight') return null;
  if (beginsAtUpload(code)) {
    const [base, before] = derivation.kind === 'stored' ? [derivation.base, derivation.transforms] : [fingerprint, []];
    return {
      keep: { derivation: { kind: 'stored', base, transforms: [...before, step] } },
      work: async () => ({ matrix: await matrixOf(code), designTitle, transforms: [step] }),
    };
  }
  if (derivation.kind !== 'ldpc') return null;
  const transforms = [...(derivation.transforms ?? []), step];
  const request = { design: design as SheetRequest['design'], derivation: { ...derivation, transforms } };
  return { keep: request, work: () => request };
}

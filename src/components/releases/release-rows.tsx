import type { z } from 'zod';
import type { Release, releaseSheetSchema } from '@/api/releases.ts';
import type { RequirementVerdict } from '@/api/sign-offs.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { paths } from '@/paths.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
import { verdictRows } from '../sign-offs/sign-off-rows.tsx';
import { ReleaseState } from './ReleaseState.tsx';

/** What a release is: of which code, by whom, for what, and whether it holds. */
export function releaseRows(release: Release): TitleRow[] {
  const { projectId, codeId, codeName, n, k, note, createdAt, createdBy, signOff, state } = release;
  return [
    { label: 'State', value: <ReleaseState state={state} /> },
    {
      label: 'Code',
      value: (
        <a className="link" href={paths.code(projectId, codeId)}>
          {codeName}
        </a>
      ),
      note: `n = ${n}, k = ${k}`,
    },
    { label: 'Released', value: dateText(createdAt), note: `by ${createdBy}` },
    {
      label: 'Sign-off',
      value: signOff ? <code className="break-all font-mono text-tiny">{signOff}</code> : 'none',
      note: signOff ? 'digest of the decision it rests on' : 'nobody had signed off on this code when it was released',
    },
    ...(note ? [{ label: 'Note', value: note }] : []),
  ];
}

/** How the code stood to the requirements when it was released; null when none were stated. */
export function requirementRows(manifest: z.infer<typeof releaseSheetSchema>['manifest']): TitleRow[] | null {
  const stated = manifest.requirements as { verdicts: RequirementVerdict[] } | null;
  return stated && verdictRows(stated.verdicts);
}

import type { z } from 'zod';
import type { Release, releaseSheetSchema } from '@/api/releases.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import type { Grade } from '@/core/evidence.ts';
import { paths } from '@/paths.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
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

interface Verdict {
  requirement: string;
  asked: number | string;
  outcome: 'met' | 'missed' | 'undecided';
  grade: Grade;
  method: string;
}

/** How the code stood to the requirements when it was released; null when none were stated. */
export function verdictRows(manifest: z.infer<typeof releaseSheetSchema>['manifest']): TitleRow[] | null {
  const stated = manifest.requirements as { verdicts: Verdict[] } | null;
  if (!stated) return null;
  return stated.verdicts.map(({ requirement, asked, outcome, grade, method }) => ({
    label: `${requirement}, ${asked}`,
    value: <span className={LOOK[outcome]}>{outcome}</span>,
    grade,
    note: method,
  }));
}

const LOOK = { met: 'text-pass', missed: 'text-fail', undecided: 'text-thin' } as const;

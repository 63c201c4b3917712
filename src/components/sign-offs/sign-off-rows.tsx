import type { EvidenceCheck, RequirementVerdict, SignOff } from '@/api/sign-offs.ts';
import { scientific } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { paths } from '@/paths.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
import { SignOffState } from './SignOffState.tsx';

/** Who asked for what, and who decided how. */
export function signOffRows({
  state,
  projectId,
  codeId,
  codeName,
  askedAt,
  askedBy,
  note,
  decision,
}: SignOff): TitleRow[] {
  return [
    { label: 'State', value: <SignOffState state={state} /> },
    {
      label: 'Code',
      value: (
        <a className="link" href={paths.code(projectId, codeId)}>
          {codeName}
        </a>
      ),
    },
    { label: 'Asked for', value: dateText(askedAt), note: `by ${askedBy}` },
    ...(note ? [{ label: 'Note', value: note }] : []),
    ...(decision
      ? [
          { label: 'Decided', value: dateText(decision.at), note: `by ${decision.by}` },
          { label: 'Reason', value: decision.reason },
        ]
      : []),
  ];
}

const CHECK_LOOK = { passed: 'text-pass', failed: 'text-fail' } as const;

export const checkRows = (checks: readonly EvidenceCheck[]): TitleRow[] =>
  checks.map(({ check, outcome, words }) => ({
    label: check,
    value: <span className={CHECK_LOOK[outcome]}>{outcome}</span>,
    grade: 'computed',
    note: words,
  }));

const VERDICT_LOOK = { met: 'text-pass', missed: 'text-fail', undecided: 'text-thin' } as const;

export const verdictRows = (verdicts: readonly RequirementVerdict[]): TitleRow[] =>
  verdicts.map(({ requirement, asked, outcome, grade, method }) => ({
    label: `${requirement}, ${typeof asked === 'number' ? scientific(asked) : asked}`,
    value: <span className={VERDICT_LOOK[outcome]}>{outcome}</span>,
    grade,
    note: method,
  }));

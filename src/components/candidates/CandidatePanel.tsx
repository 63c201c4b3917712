import { useEffect, useRef, useState } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { ApiFailure } from '@/client/api.ts';
import { enclosureText } from '@/components/codes/enclosure-text.ts';
import { choiceToSearch } from '@/components/codes/new/address.ts';
import { keepCode } from '@/components/codes/new/keep.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { classes } from '@/components/ui/classes.ts';
import { Grade } from '@/components/ui/Grade.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import { paths } from '@/paths.ts';
import { titleOf } from './candidate-words.ts';

interface Props {
  projectId: string;
  row: CandidateRow;
  mayKeep: boolean;
}

/** The numbers of one candidate, each with its grade and method, its verdicts, and the way into the project. */
export function CandidatePanel({ projectId, row, mayKeep }: Props) {
  return (
    <div className="grid content-start gap-4">
      <TitleBlock title={titleOf(row)} rows={rowsOf(row)} showTitle />
      {row.verdicts.length > 0 && <Verdicts row={row} />}
      {mayKeep && <Keep projectId={projectId} row={row} />}
    </div>
  );
}

function rowsOf({
  n,
  rank,
  girth,
  distance,
  radius,
  radiusGrade,
  columnWeight,
  rowWeight,
  structure,
  shortenBy,
}: CandidateRow): TitleRow[] {
  const k = { lower: n - rank.upper, upper: n - rank.lower };
  return [
    { label: 'Length', value: wholeNumber(n) },
    { label: 'Dimension', value: enclosureText(k), grade: rank.grade },
    { label: 'Rank', value: enclosureText(rank), grade: rank.grade, note: rank.method },
    { label: 'Girth', value: enclosureText(girth), grade: girth.grade, note: girth.method },
    { label: 'Distance', value: enclosureText(distance), grade: distance.grade, note: distance.method },
    { label: 'One-step radius', value: radius, grade: radiusGrade },
    { label: 'Weights', value: `rows ${rowWeight}, columns ${columnWeight}` },
    { label: 'Structure', value: structure === 'none' ? 'none by construction' : structure },
    ...(shortenBy
      ? [
          {
            label: 'Shorten by',
            value: `${enclosureText(shortenBy)} bits`,
            note: 'information bits dropped to hit the payload',
          },
        ]
      : []),
  ];
}

const words = { meets: 'meets', misses: 'misses', unknown: 'open' } as const;

function Verdicts({ row }: { row: CandidateRow }) {
  return (
    <section aria-label="Against requirements">
      <h2 className="mb-1">Against requirements</h2>
      <ul className="grid">
        {row.verdicts.map(({ requirement, outcome, grade, method }) => (
          <li
            key={requirement}
            className="flex flex-wrap items-baseline justify-between gap-x-3 border-hair border-b py-1.5"
            title={method}
          >
            <span>{requirement}</span>
            <span className="flex items-baseline gap-3">
              <span
                className={classes(
                  'font-semibold',
                  outcome === 'meets' && 'text-pass',
                  outcome === 'unknown' && 'text-thin',
                  outcome === 'misses' && 'text-fail',
                )}
              >
                {words[outcome]}
              </span>
              <Grade grade={grade} method={method} />
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

function Keep({ projectId, row }: { projectId: string; row: CandidateRow }) {
  const [state, setState] = useState<'idle' | 'busy' | { message: string }>('idle');
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);
  const { design, checks, transforms } = row;
  const keep = async () => {
    const controller = new AbortController();
    running.current = controller;
    setState('busy');
    try {
      const derivation = { kind: 'ldpc' as const, checks, ...(transforms.length > 0 && { transforms }) };
      location.assign(paths.code(projectId, await keepCode(projectId, { design, derivation }, controller.signal)));
    } catch (error) {
      if (controller.signal.aborted) return;
      setState({
        message: error instanceof ApiFailure || error instanceof Error ? error.message : 'The code could not be kept.',
      });
    }
  };
  return (
    <div className="grid gap-2">
      {typeof state === 'object' && (
        <Notice kind="fail" word="Not kept" live>
          {state.message}
        </Notice>
      )}
      <Button kind="primary" busy={state === 'busy'} onClick={keep}>
        {state === 'busy' ? 'The server builds and verifies it' : 'Keep in this project'}
      </Button>
      {state === 'busy' ? (
        <Button
          kind="quiet"
          onClick={() => {
            running.current?.abort();
            setState('idle');
          }}
        >
          Stop waiting
        </Button>
      ) : (
        transforms.length === 0 && (
          <ButtonLink
            kind="quiet"
            href={paths.newCode(projectId) + choiceToSearch({ ...design, params: asTyped(design.params), checks })}
          >
            Build here first
          </ButtonLink>
        )
      )}
    </div>
  );
}

const asTyped = (params: Record<string, unknown>) =>
  Object.fromEntries(
    Object.entries(params).map(([name, value]) => [
      name,
      typeof value === 'object' ? JSON.stringify(value) : String(value),
    ]),
  );

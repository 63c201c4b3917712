import { useMemo } from 'react';
import { MOST_PATTERNS } from '@/client/strata/enumeration.ts';
import { isWhole } from '@/client/strata/enumeration-store.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { Button } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted, duration, wholeNumber } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { Figure } from '../charts/Figure.tsx';
import { RateWithLimits } from '../charts/RateWithLimits.tsx';
import { levelText, rateText, scientific } from '../charts/rate-text.ts';
import { citationText } from '../codes/citation-text.ts';
import { useEnumeration } from './use-enumeration.ts';
import { LISTED_UP_TO, type WeightRow, weightRows } from './weight-rows.ts';

interface Props {
  evidence: StrataEvidence;
  seed: string;
}

/** What is known of each number of errors, and how; small ones can be enumerated from here. */
export function WeightTable({ evidence, seed }: Props) {
  const rows = useMemo(() => weightRows(evidence), [evidence]);
  const enumeration = useEnumeration(evidence);
  const columns: Column<WeightRow>[] = [
    {
      key: 'weight',
      header: 'errors',
      kind: 'number',
      cell: ({ from, to }) => (from === to ? wholeNumber(from) : `${wholeNumber(from)} – ${wholeNumber(to)}`),
    },
    { key: 'frames', header: 'patterns decoded', kind: 'number', cell: decodedText },
    {
      key: 'errors',
      header: 'failed',
      kind: 'number',
      cell: (row) => (row.known === 'untried' ? '–' : wholeNumber(row.frameErrors)),
    },
    { key: 'share', header: 'failing share', kind: 'number', cell: (row) => <Share row={row} /> },
    { key: 'grade', header: 'evidence', cell: (row) => <Evidence row={row} evidence={evidence} seed={seed} /> },
    {
      key: 'do',
      header: <span className="sr-only">Enumerate</span>,
      cell: (row) => <Doing row={row} {...enumeration} isReady={evidence.code !== null} />,
    },
  ];
  return (
    <div className="grid gap-2 text-tiny">
      <DataTable
        caption="What is known of each number of errors"
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ from }) => String(from)}
      />
      {evidence.radiusFailure && (
        <Notice kind="caution" word="No radius">
          The guaranteed radius could not be worked out: {evidence.radiusFailure}
        </Notice>
      )}
      {enumeration.failure && (
        <Notice kind="fail" word={`Weight ${enumeration.failure.weight} was not enumerated`} live>
          {enumeration.failure.message}
        </Notice>
      )}
      <p className="text-quiet">
        Sampled shares with the limits that the curve uses: together they hold at {levelText(evidence.group.level)}. A
        weight not tried counts as 0 below and as 1 above. An enumeration decodes at most {wholeNumber(MOST_PATTERNS)}{' '}
        patterns up to the symmetry found in the matrix, at some thousands a second, on one core; it is kept in this
        browser, branch by branch, and goes on from where it was left.
      </p>
    </div>
  );
}

function decodedText({ known, frames, enumeration }: WeightRow): string {
  if (known === 'proved') return 'none needed';
  if (known === 'untried') return enumeration ? 'some' : 'none';
  return known === 'computed' ? `all ${wholeNumber(frames)}` : wholeNumber(frames);
}

function Share({ row: { known, share, frameErrors } }: { row: WeightRow }) {
  if (share === null) return <span className="font-sans text-quiet">0 to 1</span>;
  if (known === 'proved' || (known === 'computed' && frameErrors === 0)) return '0 exactly';
  const rate = { value: share.estimate > 0 ? share.estimate : null, lower: share.lower, upper: share.upper };
  if (known === 'computed') return <Figure text={rateText(rate, 4)} />;
  return <RateWithLimits rate={rate} />;
}

function Evidence({ row, evidence, seed }: { row: WeightRow } & Props) {
  switch (row.known) {
    case 'proved':
      return (
        <span className="inline-grid">
          <Grade grade="proved" method={evidence.radius?.method ?? 'no error, nothing to correct'} />
          {evidence.radius && (
            <span className="min-w-56 max-w-80 text-quiet">
              {evidence.radius.method}
              {evidence.radius.source && `; ${citationText(evidence.radius.source)}`}
            </span>
          )}
        </span>
      );
    case 'computed':
      return (
        <span className="inline-grid">
          <Grade grade="computed" method="every pattern of the weight, up to symmetry" />
          <span className="text-quiet">{row.enumeration && workText(row.enumeration)}</span>
        </span>
      );
    case 'sampled':
      return <Grade grade="sampled" method={`${wholeNumber(row.frames)} frames, seed ${seed}, Clopper–Pearson`} />;
    default:
      return <Grade grade="bounded" method="nothing is known but that it is a share" />;
  }
}

const workText = ({ representatives, symmetryOrder, elapsedMs }: NonNullable<WeightRow['enumeration']>): string =>
  `${counted(representatives, 'pattern')} up to a symmetry of order ${wholeNumber(symmetryOrder)}, in ${duration(elapsedMs)}`;

type DoingProps = Omit<ReturnType<typeof useEnumeration>, 'failure'> & { row: WeightRow; isReady: boolean };

/** Enumerate, go on or cancel. */
function Doing({ row, weight, begin, cancel, isReady }: DoingProps) {
  const { enumeration } = row;
  const single = row.from === row.to && row.patterns <= LISTED_UP_TO;
  if (row.known === 'proved' || row.known === 'computed' || !single) return null;
  const begun = enumeration && !isWhole(enumeration) ? enumeration : null;
  const share = begun ? begun.done / begun.branches : 0;
  if (weight === row.from) {
    return (
      <span className="grid min-w-40 gap-1.5">
        <Progress
          label={`Branches of weight ${weight} that are done`}
          value={begun ? share : null}
          left={begun ? progressText(begun) : 'searching the symmetry'}
        />
        <Button size="small" onClick={cancel}>
          Cancel
        </Button>
      </span>
    );
  }
  return (
    <span className="inline-grid justify-items-start gap-0.5" data-screen-only>
      <Button
        size="small"
        kind="quiet"
        disabled={weight !== null || !isReady}
        onClick={() => begin(row.from)}
        aria-label={`${begun ? 'Go on enumerating' : 'Enumerate'} weight ${row.from}`}
      >
        {begun ? 'Go on' : 'Enumerate'}
      </Button>
      <span className="whitespace-nowrap text-quiet">
        {begun ? progressText(begun) : <Figure text={`${patternText(row.patterns)} patterns before symmetry`} />}
      </span>
    </span>
  );
}

const patternText = (count: number): string => (count < 1e5 ? wholeNumber(count) : `${scientific(count, 2)}`);

/** "34 % of 273 branches, 12 s left". */
function progressText({ done, branches, elapsedMs }: NonNullable<WeightRow['enumeration']>): string {
  const percent = Math.floor((100 * done) / branches);
  const left = done > 0 ? `, about ${duration((elapsedMs / done) * (branches - done))} left` : '';
  return `${percent} % of ${counted(branches, 'branch', 'branches')}${left}`;
}

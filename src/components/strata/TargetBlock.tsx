import type { Requirements } from '@/api/projects.ts';
import type { CurvePoint, Estimate } from '@/client/curves/curve.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import type { Contribution } from '@/core/simulation/stratum-planning.ts';
import { Figure } from '../charts/Figure.tsx';
import { intervalText, levelText, parameterText, rateText, scientific } from '../charts/rate-text.ts';
import { verdictOn } from '../charts/requirement.ts';
import type { RateRow } from './rate-rows.ts';
import { shareText } from './share-text.ts';

interface Props {
  row: RateRow;
  k: number;
  requirements: Requirements | null;
}

/** The rates at the target p, held against what is required there, and the weights that make them up. */
export function TargetBlock({ row: { point, heaviest }, k, requirements }: Props) {
  return (
    <div className="grid min-w-0 gap-5 lg:grid-cols-2">
      <TitleBlock title={`At p = ${parameterText(point.p)}`} rows={rateRowsAt(point, k, requirements)} />
      <div className="min-w-0 text-tiny">
        <DataTable
          caption="Weights that decide there"
          columns={COLUMNS}
          rows={heaviest}
          rowKey={({ weight }) => String(weight)}
        />
      </div>
    </div>
  );
}

const COLUMNS: Column<Contribution>[] = [
  { key: 'weight', header: 'errors', kind: 'number', cell: ({ weight }) => wholeNumber(weight) },
  {
    key: 'probability',
    header: 'P(W = w)',
    kind: 'number',
    cell: ({ probability }) => <Figure text={probability > 0 ? scientific(probability) : '0'} />,
  },
  { key: 'estimate', header: 'of the estimate', kind: 'number', cell: ({ estimateShare }) => shareText(estimateShare) },
  { key: 'upper', header: 'of the upper limit', kind: 'number', cell: ({ upperShare }) => shareText(upperShare) },
  { key: 'width', header: 'of the width', kind: 'number', cell: ({ widthShare }) => shareText(widthShare) },
];

function rateRowsAt(point: CurvePoint, k: number, requirements: Requirements | null): TitleRow[] {
  const isRequired = requirements?.channel?.kind === 'bsc' && Math.abs(requirements.channel.p / point.p - 1) < 1e-9;
  const target = (rate: number | undefined) => (isRequired ? rate : undefined);
  const uber = { ...point.fer, lower: point.fer.lower / k, upper: point.fer.upper / k };
  const rows = [rateRow('FER', point.fer, point.level, target(requirements?.targetFer))];
  rows.push(rateRow('BER', point.ber, point.level, target(requirements?.targetBer)));
  if (isRequired && k > 0) {
    const value = point.fer.value === null ? null : point.fer.value / k;
    const row = rateRow('UBER', { ...uber, value }, point.level, requirements?.targetUber);
    rows.push({
      ...row,
      note: (
        <>
          {row.note} FER over k = {wholeNumber(k)} information bits (JEDEC JESD218).
        </>
      ),
    });
  }
  return rows;
}

function rateRow(label: string, rate: Estimate, level: number, target: number | undefined): TitleRow {
  const limits =
    rate.value === null || rate.lower <= 0 ? `at most ${scientific(rate.upper, 2, 'up')}` : intervalText(rate);
  const verdict = target === undefined ? null : verdictOn(rate, target);
  return {
    label,
    value: <Figure text={rateText(rate, 3)} />,
    grade: 'bounded',
    note: (
      <>
        <Figure text={limits} />, rigorous {levelText(level)} limits.
        {verdict && target !== undefined && (
          <>
            {' '}
            Required: at most <Figure text={scientific(target, 2)} />: <strong>{verdict}</strong>.
          </>
        )}
      </>
    ),
  };
}

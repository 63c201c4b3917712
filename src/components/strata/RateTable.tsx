import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { Figure } from '../charts/Figure.tsx';
import { RateWithLimits } from '../charts/RateWithLimits.tsx';
import { levelText, parameterText } from '../charts/rate-text.ts';
import type { RateRow } from './rate-rows.ts';
import { shareText } from './share-text.ts';

interface Props {
  rows: readonly RateRow[];
  level: number;
  target: number | null;
}

/** The combined curve in figures, and which number of errors decides it at each p. */
export function RateTable({ rows, level, target }: Props) {
  const columns: Column<RateRow>[] = [
    { key: 'p', header: 'p', kind: 'number', cell: ({ point }) => <Figure text={parameterText(point.p)} /> },
    { key: 'fer', header: 'FER', kind: 'number', cell: ({ point }) => <RateWithLimits rate={point.fer} /> },
    { key: 'ber', header: 'BER', kind: 'number', cell: ({ point }) => <RateWithLimits rate={point.ber} /> },
    {
      key: 'estimate',
      header: 'most failures at',
      cell: ({ heaviest }) => {
        const most = heaviest.reduce((a, b) => (b.estimateShare > a.estimateShare ? b : a));
        return most.estimateShare > 0 ? weightText(most.weight, most.estimateShare) : 'no failure seen';
      },
    },
    {
      key: 'upper',
      header: 'most of the upper limit',
      cell: ({ heaviest }) => weightText(heaviest[0]!.weight, heaviest[0]!.upperShare),
    },
  ];
  return (
    <div className="grid gap-2 text-tiny">
      <DataTable
        caption="Rates over p from the strata"
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ point }) => String(point.p)}
        selected={({ point }) => point.p === target}
        empty="No frames yet."
      />
      <p className="flex flex-wrap items-baseline gap-x-3 text-quiet">
        <Grade grade="bounded" method="Σ P(W = w)·φ_w, rigorous limits of each φ_w" />
        Estimate and rigorous {levelText(level)} limits, which hold at all p at once; down to 10⁻³⁰. The estimate takes
        a weight not tried to fail as the next heavier one.
      </p>
    </div>
  );
}

const weightText = (weight: number, share: number): string => `${wholeNumber(weight)} errors, ${shareText(share)}`;

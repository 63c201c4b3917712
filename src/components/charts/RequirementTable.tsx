import { isThin } from '@/client/curves/curve.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { CurveSwatch } from './CurveSwatch.tsx';
import type { ChartCurve } from './chart-curve.ts';
import type { Requirement } from './error-rate-chart/domain.ts';
import { parameterText, scientific } from './rate-text.ts';
import { type Verdict, verdictOn } from './requirement.ts';

interface Props {
  curves: readonly ChartCurve[];
  requirement: Requirement;
}

const LOOK: Record<Verdict, string> = {
  met: 'text-pass',
  above: 'text-fail',
  undecided: 'text-thin',
  'no point': 'text-thin',
};

/** At the required channel point: the upper limit of each curve and what it says. Only a point measured there counts;
 *  nothing is read off between points. */
export function RequirementTable({ curves, requirement }: Props) {
  const { p, kind, target } = requirement;
  if (p === null) return null;
  const pointOf = ({ curve }: ChartCurve) => curve.points.find((point) => Math.abs(point.p / p - 1) < 1e-9);
  const columns: Column<ChartCurve>[] = [
    {
      key: 'curve',
      header: `at p = ${parameterText(p)}`,
      cell: (row) => (
        <span className="inline-flex items-center gap-2">
          <CurveSwatch style={row.style} />
          {row.label}
        </span>
      ),
    },
    {
      key: 'upper',
      header: `${kind.toUpperCase()} ≤`,
      kind: 'number',
      cell: (row) => {
        const point = pointOf(row);
        return <span className="whitespace-nowrap">{point ? scientific(point[kind].upper, 2, 'up') : 'no point'}</span>;
      },
    },
    {
      key: 'verdict',
      header: <span className="sr-only">Verdict</span>,
      cell: (row) => {
        const point = pointOf(row);
        const verdict = verdictOn(point?.[kind], target);
        const word = verdict === 'no point' ? 'thin' : verdict;
        const thin = point && isThin(point) && verdict !== 'no point' ? ', thin' : '';
        return <span className={`whitespace-nowrap font-semibold ${LOOK[verdict]}`}>{word + thin}</span>;
      },
    },
  ];
  return (
    <DataTable
      caption={requirement.label}
      columns={columns}
      rows={curves}
      rowKey={(row) => row.curve.key}
      empty="No curve to hold against the requirement."
    />
  );
}

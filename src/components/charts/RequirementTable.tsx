import { isThin, pointAt } from '@/client/curves/curve.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { CurveSwatch } from './CurveSwatch.tsx';
import type { ChartCurve } from './chart-curve.ts';
import type { Requirement } from './error-rate-chart/domain.ts';
import { Figure } from './Figure.tsx';
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
 *  nothing is read off between points, save from weight strata, whose limits hold at every p. */
export function RequirementTable({ curves, requirement }: Props) {
  const { p, kind, target } = requirement;
  if (p === null) return null;
  const pointOf = ({ curve }: ChartCurve) => pointAt(curve, p);
  const columns: Column<ChartCurve>[] = [
    {
      key: 'curve',
      header: `at p = ${parameterText(p)}`,
      cell: (row) => (
        <span className="inline-grid text-tiny">
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
        return <Figure text={point ? scientific(point[kind].upper, 2, 'up') : 'no point'} />;
      },
    },
    {
      key: 'verdict',
      header: <span className="sr-only">Verdict</span>,
      cell: (row) => {
        const point = pointOf(row);
        const verdict = verdictOn(point?.[kind], target);
        return (
          <span className={`inline-grid font-semibold ${LOOK[verdict]}`}>
            {point && <span>{verdict}</span>}
            {(!point || isThin(point)) && <span className="text-thin">thin</span>}
          </span>
        );
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

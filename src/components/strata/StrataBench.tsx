import { useMemo, useState } from 'react';
import type { Requirements } from '@/api/projects.ts';
import type { Run } from '@/api/runs.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { useUrlParam } from '../charts/url-state.ts';
import { numberOf } from '../runs/number-of.ts';
import { NextFrames } from './NextFrames.tsx';
import { RateTable } from './RateTable.tsx';
import { rateRows } from './rate-rows.ts';
import { TargetBlock } from './TargetBlock.tsx';
import { WeightTable } from './WeightTable.tsx';

interface Props {
  evidence: readonly StrataEvidence[];
  curves: readonly ChartCurve[];
  requirements: Requirements | null;
  run: Run;
  projectId: string;
  canRun: boolean;
}

/** Weight strata of a run: the rates at a target, over p, and what each weight rests on. */
export function StrataBench({ evidence, curves, requirements, run, projectId, canRun }: Props) {
  const [key, setKey] = useUrlParam('strata');
  const [at, setAt] = useUrlParam('at');
  const shown = evidence.find(({ group }) => group.key === key) ?? evidence[0]!;
  const proposed = requirements?.channel?.kind === 'bsc' ? requirements.channel.p : null;
  const target = usableTarget(at, proposed ?? middleOf(shown));
  const rows = useMemo(() => rateRows(shown, target), [shown, target]);
  const row = rows.find(({ point }) => point.p === target);
  const labels = new Map(curves.map(({ curve, label }) => [curve.key, label]));
  return (
    <section className="grid min-w-0 gap-6" aria-label="Weight strata">
      <h2>Weight strata</h2>
      <div className="flex flex-wrap items-start gap-4" data-screen-only>
        {evidence.length > 1 && (
          <SelectField
            label="Curve"
            className="min-w-64"
            value={shown.group.key}
            choices={evidence.map(({ group }) => ({
              value: group.key,
              label: labels.get(group.key) ?? group.codeLabel,
            }))}
            onChange={(event) => setKey(event.target.value)}
          />
        )}
        <TargetField key={target} target={target} onTarget={(p) => setAt(String(p))} />
      </div>
      {row && <TargetBlock row={row} k={shown.group.k} requirements={requirements} />}
      {target !== null && row && (
        <NextFrames key={shown.group.key} evidence={shown} run={run} projectId={projectId} p={target} canRun={canRun} />
      )}
      <RateTable rows={rows} level={shown.group.level} target={target} />
      <WeightTable key={`weights ${shown.group.key}`} evidence={shown} seed={run.seed} />
    </section>
  );
}

/** Taken when the field is left or Enter is pressed, so that a half-typed p moves nothing. */
function TargetField({ target, onTarget }: { target: number | null; onTarget: (p: number) => void }) {
  const [typed, setTyped] = useState(target === null ? '' : String(target));
  const p = numberOf(typed);
  const isFine = p > 0 && p <= 0.5;
  const take = () => isFine && onTarget(p);
  return (
    <NumberField
      label="Target p"
      className="w-48"
      value={typed}
      error={isFine ? undefined : 'a crossover probability above 0 and at most 0.5'}
      hint="read the curve here"
      onChange={(event) => setTyped(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => event.key === 'Enter' && take()}
    />
  );
}

function usableTarget(at: string | null, otherwise: number | null): number | null {
  const p = numberOf(at ?? '');
  return p > 0 && p <= 0.5 ? p : otherwise;
}

const middleOf = ({ curve: { points } }: StrataEvidence): number | null =>
  points[Math.floor(points.length / 2)]?.p ?? null;

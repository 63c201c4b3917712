import { useState } from 'react';
import type { Run } from '@/api/runs.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { NumberField } from '@/components/ui/fields.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { weightOf } from '@/core/simulation/known-strata.ts';
import { type Allocation, allocateShards } from '@/core/simulation/stratum-planning.ts';
import { paths } from '@/paths.ts';
import { parameterText } from '../charts/rate-text.ts';
import { numberOf } from '../runs/number-of.ts';

interface Props {
  evidence: StrataEvidence;
  run: Run;
  projectId: string;
  p: number;
  canRun: boolean;
}

const MOST_SHARDS = 2000;

/** Where the next frames would narrow the interval at p most, and a run that has them. */
export function NextFrames({ evidence, run, projectId, p, canRun }: Props) {
  const [typed, setTyped] = useState('50');
  const [plan, setPlan] = useState<{ p: number; allocation: Allocation[] } | null>(null);
  const { group, strata } = evidence;
  const shards = numberOf(typed);
  const isFine = Number.isInteger(shards) && shards >= 1 && shards <= MOST_SHARDS;
  const workOut = () =>
    setPlan({ p, allocation: allocateShards(strata, group.n, p, group.level, shards, run.framesPerShard) });
  const shown = plan?.p === p ? plan.allocation : null;
  return (
    <section className="grid gap-3" aria-label="Next frames" data-screen-only>
      <h3 className="font-semibold">Where the next frames help most at p = {parameterText(p)}</h3>
      <div className="flex flex-wrap items-start gap-3">
        <NumberField
          label={`Shards of ${wholeNumber(run.framesPerShard)} frames to spend`}
          className="w-64"
          value={typed}
          error={isFine ? undefined : `a whole number of shards from 1 to ${wholeNumber(MOST_SHARDS)}`}
          onChange={(event) => setTyped(event.target.value)}
        />
        <Button size="small" className="mt-6" disabled={!isFine || strata.length === 0} onClick={workOut}>
          Work out
        </Button>
      </div>
      {shown && (
        <div className="grid gap-3 text-tiny">
          <DataTable
            caption="Shards by weight"
            columns={columnsFor(run.framesPerShard)}
            rows={shown}
            rowKey={({ weight }) => String(weight)}
            empty="No frames would narrow it: what is left is known exactly, or too unlikely at this p."
          />
          {shown.length > 0 && (
            <p className="flex flex-wrap items-baseline gap-x-3 text-quiet">
              <Grade grade="sampled" method="planned from the shares seen so far" />A plan from the shares seen so far.
              This run gives every weight the same number of frames, so that these cannot be added to it one by one; and
              frames added because of the failures counted would spoil the limits. A new run with a seed of its own has
              frames that do not depend on these.
            </p>
          )}
          {shown.length > 0 && canRun && (
            <div>
              <ButtonLink size="small" href={followUp(evidence, run, projectId, p, shown)}>
                State a run with so many frames
              </ButtonLink>
            </div>
          )}
        </div>
      )}
    </section>
  );
}

const columnsFor = (framesPerShard: number): Column<Allocation>[] => [
  { key: 'weight', header: 'errors', kind: 'number', cell: ({ weight }) => wholeNumber(weight) },
  { key: 'shards', header: 'shards', kind: 'number', cell: ({ shards }) => wholeNumber(shards) },
  { key: 'frames', header: 'frames', kind: 'number', cell: ({ shards }) => wholeNumber(shards * framesPerShard) },
];

/** The form of a new run over the weights that are not known exactly, with as many frames as the plan's most. */
export function followUp(
  { group, strata }: Pick<StrataEvidence, 'group' | 'strata'>,
  run: Pick<Run, 'framesPerShard'>,
  projectId: string,
  p: number,
  allocation: readonly Allocation[],
): string {
  const exact = new Set(strata.filter(({ grade }) => grade !== 'sampled').map(({ weight }) => weight));
  const open = [...group.points.map(weightOf), ...allocation.map(({ weight }) => weight)].filter(
    (weight) => !exact.has(weight),
  );
  const framesAt = (weight: number) => strata.find((stratum) => stratum.weight === weight)?.frames ?? 0;
  const frames = Math.max(...allocation.map(({ weight, shards }) => framesAt(weight) + shards * run.framesPerShard));
  const query = new URLSearchParams({
    code: group.codeId,
    decoder: group.decoder.kind,
    strata: `${Math.min(...open)}..${Math.max(...open)}`,
    frames: String(frames),
    at: String(p),
  });
  return `${paths.newRun(projectId)}?${query}`;
}

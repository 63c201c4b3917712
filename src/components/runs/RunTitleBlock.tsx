import type { Point, Run } from '@/api/runs.ts';
import { counted } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import { INTERVAL_METHOD } from '../charts/interval-method.ts';
import { levelText } from '../charts/rate-text.ts';
import { PLACE, STATE_WORD } from './run-progress.ts';
import { stoppingRules } from './stopping-text.ts';

interface Props {
  run: Run;
  points: readonly Point[];
}

/** What the run is, so that it can be done again to the last bit. */
export function RunTitleBlock({ run, points }: Props) {
  const level = points[0]?.level;
  const rules = stoppingRules(run.stopping);
  const rows: TitleRow[] = [
    {
      label: 'Run',
      value: run.name,
      note: run.isDemo ? 'part of the demonstration, computed from this seed' : undefined,
    },
    { label: 'State', value: STATE_WORD[run.state] },
    { label: 'Seed', value: <span className="font-mono">{run.seed}</span> },
    { label: 'Shard', value: counted(run.framesPerShard, 'frame') },
    {
      label: 'A point ends',
      value: `at ${rules[0]}`,
      note: rules
        .slice(1)
        .map((rule) => `or at ${rule}`)
        .join(', '),
    },
    { label: 'Place', value: PLACE[run.place] },
    { label: 'Points', value: `${run.pointCount}` },
    ...(level === undefined
      ? []
      : [
          {
            label: 'Intervals',
            value: levelText(level),
            note: `FER: ${INTERVAL_METHOD.fer}; BER: ${INTERVAL_METHOD.ber}`,
          },
        ]),
    { label: 'Stated', value: dateText(run.createdAt), note: `by ${run.createdBy}` },
  ];
  return <TitleBlock title="Run" rows={rows} />;
}

/** The same on the server and in every browser: "2026-12-01 05:00 UTC". */
export const dateText = (iso: string): string => `${iso.slice(0, 10)} ${iso.slice(11, 16)} UTC`;

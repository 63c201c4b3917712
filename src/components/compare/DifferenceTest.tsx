import { useState } from 'react';
import type { Run } from '@/api/runs.ts';
import { SelectField } from '@/components/ui/fields.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { Figure } from '../charts/Figure.tsx';
import { levelText, parameterText } from '../charts/rate-text.ts';
import { commonPoints, differenceText, pValueText, ratioText, sharesFrames } from './difference.ts';

interface Props {
  curves: readonly ChartCurve[];
  runs: ReadonlyMap<string, Run>;
}

const LEVEL = 0.99;

/** Whether two curves fail at different rates at a p that both were measured at. */
export function DifferenceTest({ curves, runs }: Props) {
  const sampled = curves.filter(({ curve }) => !curve.at && curve.points.length > 0);
  const [firstKey, setFirst] = useState<string | null>(null);
  const [secondKey, setSecond] = useState<string | null>(null);
  const [wantedP, setP] = useState<number | null>(null);
  if (sampled.length < 2) return null;
  const first = sampled.find(({ curve }) => curve.key === firstKey) ?? sampled[0]!;
  const others = sampled.filter((other) => other !== first);
  const second = others.find(({ curve }) => curve.key === secondKey) ?? others[0]!;
  const common = commonPoints(first.curve, second.curve);
  const pair = common.find(([{ p }]) => p === wantedP) ?? common[Math.floor(common.length / 2)];
  const choices = (from: readonly ChartCurve[]) => from.map(({ curve, label }) => ({ value: curve.key, label }));
  return (
    <section className="grid gap-3" aria-label="Test of a difference">
      <h2>Do two of them differ?</h2>
      <div className="grid gap-4 sm:grid-cols-3" data-screen-only>
        <SelectField
          label="First"
          value={first.curve.key}
          choices={choices(sampled)}
          onChange={(event) => setFirst(event.target.value)}
        />
        <SelectField
          label="Second"
          value={second.curve.key}
          choices={choices(others)}
          onChange={(event) => setSecond(event.target.value)}
        />
        {pair && (
          <SelectField
            label="At p"
            value={String(pair[0].p)}
            choices={common.map(([{ p }]) => ({ value: String(p), label: parameterText(p) }))}
            onChange={(event) => setP(Number(event.target.value))}
          />
        )}
      </div>
      {pair ? (
        <Verdict
          first={first}
          second={second}
          pair={pair}
          isPaired={sharesFrames(first.curve, second.curve, (id) => runs.get(id)?.seed)}
        />
      ) : (
        <p className="text-quiet">They were not measured at a common p; nothing is read off between points.</p>
      )}
    </section>
  );
}

interface VerdictProps {
  first: ChartCurve;
  second: ChartCurve;
  pair: ReturnType<typeof commonPoints>[number];
  isPaired: boolean;
}

function Verdict({ first, second, pair, isPaired }: VerdictProps) {
  const result = differenceText(first.label, second.label, pair, LEVEL);
  const counts = pair.map(
    ({ frames, frameErrors }) => `${counted(frameErrors, 'frame error')} in ${counted(frames, 'frame')}`,
  );
  return (
    <div className="grid gap-2 border border-ink bg-sheet px-3 py-2" role="status">
      <p className="font-semibold">{result.verdict}</p>
      <p className="text-tiny">
        At p = {parameterText(pair[0].p)}: {counts[0]} against {counts[1]}; FER of the first over the second{' '}
        <Figure text={ratioText(result.ratio)} />, p-value <Figure text={pValueText(result.pValue)} />.
      </p>
      <p className="flex flex-wrap items-baseline gap-x-3 text-quiet text-tiny">
        <Grade grade="sampled" method={counts.join('; ')} />
        Fisher’s exact test given the sum of the errors (1934), two-sided; limits of the ratio by Clopper and Pearson on
        the share of the first (Przyborowski and Wilenski 1940), {levelText(LEVEL)}. One test at one p: who tries many
        finds some difference by chance.
      </p>
      {isPaired && (
        <Notice kind="caution" word="Shared frames">
          Both met the same error patterns (same seed and length), and the test takes them to be independent. Run one of
          them again with another seed for a p-value that can be quoted.
        </Notice>
      )}
    </div>
  );
}

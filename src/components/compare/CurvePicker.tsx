import { useState } from 'react';
import type { Measurement } from '@/api/measurements.ts';
import type { Run } from '@/api/runs.ts';
import type { Curve } from '@/client/curves/curve.ts';
import { curveDecoderText } from '@/client/curves/curve-source.ts';
import { TextField } from '@/components/ui/fields.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { CurveSwatch } from '../charts/CurveSwatch.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { RunState } from '../runs/RunState.tsx';

interface Props {
  runs: readonly Run[];
  measurements: readonly Measurement[];
  /** Where measured data are added; null for those who may not. */
  addAddress: string | null;
  onRemove: ((measured: Measurement) => void) | null;
  curves: readonly Curve[];
  chosen: readonly ChartCurve[];
  onChange: (keys: string[]) => void;
}

const FILTER_FROM = 12;

/** All measured curves of the project by run; those ticked are overlaid. */
export function CurvePicker({ runs, measurements, addAddress, onRemove, curves, chosen, onChange }: Props) {
  const [filter, setFilter] = useState('');
  const chosenKeys = chosen.map(({ curve }) => curve.key);
  const matches = (curve: Curve, source: { name: string }) =>
    `${source.name} ${curve.codeLabel} ${curveDecoderText(curve)}`.toLowerCase().includes(filter.toLowerCase());
  const toggle = (key: string, isChosen: boolean) =>
    onChange(isChosen ? [...chosenKeys, key] : chosenKeys.filter((other) => other !== key));
  const choiceOf = (curve: Curve) => (
    <Choice
      key={curve.key}
      curve={curve}
      chartCurve={chosen.find((other) => other.curve.key === curve.key)}
      onChange={(isChosen) => toggle(curve.key, isChosen)}
    />
  );
  return (
    <section className="grid gap-2" aria-label="Curves to overlay" data-screen-only>
      <h2>Curves</h2>
      {curves.length > FILTER_FROM && (
        <TextField label="Filter" value={filter} onChange={(event) => setFilter(event.target.value)} />
      )}
      <div className="grid max-h-[32rem] gap-3 overflow-y-auto pr-1">
        {runs.map((run) => {
          const own = curves.filter((curve) => curve.runId === run.id && matches(curve, run));
          if (own.length === 0) return null;
          return (
            <fieldset key={run.id} className="min-w-0">
              <legend className="flex w-full items-baseline justify-between gap-3 border-ink border-b pb-0.5">
                <span className="font-semibold">{run.name}</span>
                <RunState run={run} />
              </legend>
              {own.map(choiceOf)}
            </fieldset>
          );
        })}
        {measurements.map((measured) => {
          const own = curves.filter((curve) => curve.runId === measured.id && matches(curve, measured));
          if (own.length === 0) return null;
          return (
            <fieldset key={measured.id} className="min-w-0">
              <legend className="flex w-full items-baseline justify-between gap-3 border-ink border-b pb-0.5">
                <span className="font-semibold">{measured.name}</span>
                {onRemove && (
                  <button type="button" className="link text-tiny" onClick={() => onRemove(measured)}>
                    Remove<span className="sr-only"> {measured.name}</span>
                  </button>
                )}
              </legend>
              {own.map(choiceOf)}
            </fieldset>
          );
        })}
      </div>
      {addAddress && (
        <a className="link justify-self-start" href={addAddress}>
          Add measured data
        </a>
      )}
    </section>
  );
}

interface ChoiceProps {
  curve: Curve;
  /** Its look, when it is overlaid. */
  chartCurve: ChartCurve | undefined;
  onChange: (isChosen: boolean) => void;
}

function Choice({ curve, chartCurve, onChange }: ChoiceProps) {
  return (
    <label className="flex cursor-pointer items-baseline gap-2.5 border-hair border-b py-1.5">
      <input
        type="checkbox"
        className="accent-act"
        checked={chartCurve !== undefined}
        onChange={(event) => onChange(event.target.checked)}
      />
      <span className="min-w-0 grow">
        {curve.codeLabel}
        <span className="block text-quiet text-tiny">
          {curveDecoderText(curve)}, {counted(curve.points.length, 'point')}
        </span>
      </span>
      {chartCurve && <CurveSwatch style={chartCurve.style} showLetter />}
    </label>
  );
}

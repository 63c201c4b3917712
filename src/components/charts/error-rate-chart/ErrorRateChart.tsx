import { useMemo, useRef } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import { uncodedFormula } from '@/client/curves/uncoded.ts';
import type { ChartCurve } from '../chart-curve.ts';
import { type ChartFile, keepChart } from '../export/keep-chart.ts';
import { levelText } from '../rate-text.ts';
import { ChartTools } from './ChartTools.tsx';
import { useChartModel } from './chart-model.ts';
import { Drawing } from './Drawing.tsx';
import { describeChart } from './describe.ts';
import type { ChartWindow, Requirement } from './domain.ts';
import { Legend, MarkKey } from './Legend.tsx';
import { pointSentence, Readout } from './Readout.tsx';
import { useChartReading } from './use-chart-reading.ts';
import { useWidth } from './use-width.ts';

export interface ErrorRateChartProps {
  title: string;
  curves: readonly ChartCurve[];
  kind: RateKind;
  onKind: (kind: RateKind) => void;
  /** Keys of curves that are not drawn. */
  hidden: ReadonlySet<string>;
  onToggle: (curveKey: string) => void;
  /** null shows everything. */
  zoom: ChartWindow | null;
  onZoom: (zoom: ChartWindow | null) => void;
  requirement?: Requirement | null;
  /** Crossover probabilities to come, so that the axis does not move while a run fills in. */
  planned?: readonly number[];
  /** How the intervals of this rate were computed. */
  intervalMethod: string;
  /** Runs and seeds the points are from; stands under the chart in files. */
  provenance: string;
  /** A point was picked by click, tap or key. */
  onChoose?: (pointId: string) => void;
}

/** Error rates against the channel, on logarithmic axes. What a pointer can read off it, a keyboard can too. */
export function ErrorRateChart(props: ErrorRateChartProps) {
  const { title, curves, kind } = props;
  const box = useRef<HTMLDivElement>(null);
  const svg = useRef<SVGSVGElement>(null);
  const model = useChartModel(props, useWidth(box, 760));
  const reading = useChartReading(svg, model, props);
  const { active } = reading;
  const description = useMemo(() => describeChart(model), [model]);
  const caption = intervalCaption(curves, props.intervalMethod);
  const keep = (file: ChartFile) => {
    const shown = curves.filter(({ curve }) => !props.hidden.has(curve.key));
    const bands = shown.some(({ curve }) => curve.at) ? '; bands: rigorous limits from weight strata' : '';
    const key = `${markWords(caption)}, ${uncodedFormula(kind)}${bands}.`;
    return keepChart(svg.current!, { title, curves: shown, key, provenance: props.provenance }, file);
  };

  return (
    <figure className="min-w-0 border border-rule bg-sheet px-2 pt-2 pb-3 sm:px-4" data-chart="error-rate">
      <ChartTools {...props} onMagnify={reading.onMagnify} onKeep={keep} />
      {/* biome-ignore lint/a11y/useSemanticElements: a fieldset groups form controls, this groups a drawing's points */}
      <div
        ref={box}
        role="group"
        aria-label={`${title}. Arrow keys go through the points, plus and minus zoom, 0 shows the whole chart.`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the points are walked with the arrow keys from here
        tabIndex={0}
        className="relative"
        onKeyDown={reading.onKeyDown}
        onBlur={reading.clear}
      >
        <Drawing
          {...reading.pointer}
          ref={svg}
          model={model}
          title={title}
          description={description}
          choice={reading.choice}
          dragBox={reading.dragBox}
          emptyText={curves.length > 0 && model.placed.length === 0 ? 'Every curve is hidden.' : 'No frames yet.'}
        />
        {active && <Readout {...active} kind={kind} width={model.frame.width} />}
        <p role="status" className="sr-only">
          {active ? pointSentence(active.chartCurve.label, active.mark.point, kind) : ''}
        </p>
      </div>
      <figcaption className="mt-2 grid gap-1.5 px-1">
        <Legend curves={curves} hidden={props.hidden} onToggle={props.onToggle} />
        <MarkKey interval={caption} kind={kind} hasBands={curves.some(({ curve }) => curve.at)} />
      </figcaption>
    </figure>
  );
}

/** The key of marks in words, for a file, where they are drawn in the chart alone. */
const markWords = (interval: string) =>
  `Bars: interval, ${interval}; open circles: fewer than 100 frame errors; open arrows: no error seen, the rate is below the bar; thin lines`;

function intervalCaption(curves: readonly ChartCurve[], method: string): string {
  const level = curves.flatMap(({ curve }) => curve.points.slice(0, 1)).at(0)?.level;
  return level === undefined ? method : `${levelText(level)}, ${method}`;
}

import { type PointerEvent, useMemo, useRef, useState } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import type { ChartCurve } from '../chart-curve.ts';
import { levelText } from '../rate-text.ts';
import { ChartTools } from './ChartTools.tsx';
import { findChoice, useChartModel } from './chart-model.ts';
import { Drawing } from './Drawing.tsx';
import { describeChart } from './describe.ts';
import { type ChartWindow, magnify, type Requirement } from './domain.ts';
import { Legend, MarkKey } from './Legend.tsx';
import { nearestMark } from './marks.ts';
import { pointSentence, Readout } from './Readout.tsx';
import { chartKeyHandler } from './use-chart-keys.ts';
import { useDragZoom } from './use-drag-zoom.ts';
import { useWidth } from './use-width.ts';
import type { Choice } from './walk.ts';

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
  /** A point was picked by click, tap or key. */
  onChoose?: (pointId: string) => void;
}

const REACH_PX = 26;

/** Error rates against the channel, on logarithmic axes. What a pointer can read off it, a keyboard can too. */
export function ErrorRateChart(props: ErrorRateChartProps) {
  const { title, curves, kind, onZoom } = props;
  const box = useRef<HTMLDivElement>(null);
  const svg = useRef<SVGSVGElement>(null);
  const [choice, setChoice] = useState<Choice | null>(null);
  const model = useChartModel(props, useWidth(box, 760));
  const { frame, window, placed } = model;
  const layers = useMemo(() => placed.map(({ marks }) => marks), [placed]);
  const drag = useDragZoom(svg, frame, window, onZoom);
  const active = findChoice(placed, choice);

  const choose = (next: Choice | null) => {
    setChoice(next);
    if (next) props.onChoose?.(next.pointId);
  };
  const under = (event: PointerEvent): Choice | null => {
    const { x, y } = drag.place(event);
    const near = nearestMark(layers, x, y, REACH_PX);
    return near && { curveKey: near.curve.key, pointId: near.mark.point.pointId };
  };
  const onMagnify = (factor: number) => {
    const next = magnify(window, factor, active ? placeInPlot(active.mark, frame) : undefined);
    if (next) onZoom(next);
  };

  return (
    <figure className="min-w-0 border border-rule bg-sheet px-2 pt-2 pb-3 sm:px-4" data-chart="error-rate">
      <ChartTools {...props} onMagnify={onMagnify} />
      {/* biome-ignore lint/a11y/useSemanticElements: a fieldset groups form controls, this groups a drawing's points */}
      <div
        ref={box}
        role="group"
        aria-label={`${title}. Arrow keys go through the points, plus and minus zoom, 0 shows the whole chart.`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the points are walked with the arrow keys from here
        tabIndex={0}
        className="relative"
        onKeyDown={chartKeyHandler({
          curves: layers,
          choice,
          onChoose: choose,
          onClear: () => (drag.box ? drag.cancel() : setChoice(null)),
          onMagnify,
          onWhole: () => onZoom(null),
        })}
        onBlur={() => setChoice(null)}
      >
        <Drawing
          ref={svg}
          model={model}
          title={title}
          description={describeChart(
            placed.map(({ chartCurve }) => chartCurve),
            kind,
            model.requirement,
          )}
          choice={choice}
          dragBox={drag.box}
          emptyText={curves.length > 0 && placed.length === 0 ? 'Every curve is hidden.' : 'No frames yet.'}
          onPointerDown={drag.onPointerDown}
          onPointerMove={(event) => (drag.box ? drag.onPointerMove(event) : setChoice(under(event)))}
          onPointerUp={(event) => {
            if (!drag.onPointerUp()) choose(under(event));
          }}
          onPointerCancel={drag.cancel}
          onPointerLeave={(event) => event.pointerType !== 'touch' && !drag.box && setChoice(null)}
        />
        {active && (
          <Readout
            chartCurve={active.chartCurve}
            point={active.mark.point}
            kind={kind}
            x={active.mark.x}
            y={active.mark.y}
            width={frame.width}
          />
        )}
        <p role="status" className="sr-only">
          {active ? pointSentence(active.chartCurve.label, active.mark.point, kind) : ''}
        </p>
      </div>
      <figcaption className="mt-2 grid gap-1.5 px-1">
        <Legend curves={curves} hidden={props.hidden} onToggle={props.onToggle} />
        <MarkKey interval={intervalCaption(curves, props.intervalMethod)} kind={kind} />
      </figcaption>
    </figure>
  );
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** Fractions of the plot from its left and its top. */
const placeInPlot = ({ x, y }: { x: number; y: number }, { left, right, top, bottom }: Box) => ({
  x: Math.min(1, Math.max(0, (x - left) / (right - left))),
  y: Math.min(1, Math.max(0, (y - top) / (bottom - top))),
});

function intervalCaption(curves: readonly ChartCurve[], method: string): string {
  const level = curves.flatMap(({ curve }) => curve.points.slice(0, 1)).at(0)?.level;
  return level === undefined ? method : `${levelText(level)}, ${method}`;
}

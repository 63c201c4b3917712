import type { ReactNode, SVGAttributes } from 'react';
import { useId } from 'react';
import { Axes } from './Axes.tsx';
import { RequirementMark, UncodedLines, Unmeasured } from './Backdrop.tsx';
import { CurveLayer } from './CurveLayer.tsx';
import type { ChartModel } from './chart-model.ts';
import { EndLabels } from './EndLabels.tsx';
import type { DragBox } from './use-drag-zoom.ts';
import type { Choice } from './walk.ts';

interface Props extends SVGAttributes<SVGSVGElement> {
  model: ChartModel;
  title: string;
  description: string;
  choice: Choice | null;
  dragBox: DragBox | null;
  /** Said in the middle when there is nothing to draw. */
  emptyText: string;
  ref: React.Ref<SVGSVGElement>;
}

/** The chart itself, back to front: shading, grid, reference lines, requirement, curves, names. */
export function Drawing({ model, title, description, choice, dragBox, emptyText, ref, ...events }: Props) {
  const id = useId();
  const { frame, window, kind, placed, requirement } = model;
  const isEmpty = placed.every(({ marks }) => marks.marks.length === 0);
  return (
    <svg
      {...events}
      ref={ref}
      viewBox={`0 0 ${frame.width} ${frame.height}`}
      className="block w-full touch-pan-y select-none font-sans"
      role="img"
      aria-labelledby={`${id}-title`}
      aria-describedby={`${id}-desc`}
    >
      <title id={`${id}-title`}>{title}</title>
      <desc id={`${id}-desc`}>{description}</desc>
      <Unmeasured frame={frame} last={model.last} />
      <Axes frame={frame} window={window} kind={kind} />
      <PlotClip id={`${id}-plot`} model={model}>
        <UncodedLines frame={frame} window={window} kind={kind} lengths={model.lengths} />
      </PlotClip>
      {requirement && <RequirementMark frame={frame} requirement={requirement} />}
      <PlotClip id={`${id}-curves`} model={model}>
        {placed.map(({ chartCurve, marks }) => (
          <CurveLayer
            key={chartCurve.curve.key}
            placed={marks}
            style={chartCurve.style}
            activePointId={choice?.curveKey === chartCurve.curve.key ? choice.pointId : null}
          />
        ))}
      </PlotClip>
      <EndLabels frame={frame} placed={placed} texts={model.endTexts} />
      {dragBox && <DragOutline box={dragBox} />}
      {isEmpty && (
        <text
          x={(frame.left + frame.right) / 2}
          y={(frame.top + frame.bottom) / 2}
          textAnchor="middle"
          className="fill-quiet"
          fontSize={14}
        >
          {emptyText}
        </text>
      )}
    </svg>
  );
}

/** Keeps lines inside the plot, with room at the edge for a mark that sits on it. */
function PlotClip({ id, model: { frame }, children }: { id: string; model: ChartModel; children: ReactNode }) {
  const { left, right, top, bottom } = frame;
  return (
    <>
      <clipPath id={id}>
        <rect x={left - 1} y={top - 6} width={right - left + 7} height={bottom - top + 6} />
      </clipPath>
      <g clipPath={`url(#${id})`}>{children}</g>
    </>
  );
}

function DragOutline({ box: { from, to } }: { box: DragBox }) {
  return (
    <rect
      x={Math.min(from.x, to.x)}
      y={Math.min(from.y, to.y)}
      width={Math.abs(to.x - from.x)}
      height={Math.abs(to.y - from.y)}
      fill="var(--act)"
      fillOpacity="0.1"
      stroke="var(--act)"
      strokeDasharray="4 3"
    />
  );
}

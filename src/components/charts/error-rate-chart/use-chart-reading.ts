import { type PointerEvent, type RefObject, useMemo, useState } from 'react';
import { type ChartModel, findChoice } from './chart-model.ts';
import { type ChartWindow, magnify } from './domain.ts';
import type { Frame } from './frame.ts';
import { type Mark, nearestMark } from './marks.ts';
import { chartKeyHandler } from './use-chart-keys.ts';
import { useDragZoom } from './use-drag-zoom.ts';
import type { Choice } from './walk.ts';

interface Outlets {
  onZoom: (zoom: ChartWindow | null) => void;
  onChoose?: (pointId: string) => void;
}

const REACH_PX = 26;

/** Reading the chart: which point is looked at, by pointer, tap or key, and zooming into it. */
export function useChartReading(svg: RefObject<SVGSVGElement | null>, model: ChartModel, outlets: Outlets) {
  const { frame, window, placed } = model;
  const [choice, setChoice] = useState<Choice | null>(null);
  const layers = useMemo(() => placed.map(({ marks }) => marks), [placed]);
  const drag = useDragZoom(svg, frame, window, outlets.onZoom);
  const active = findChoice(placed, choice);
  const clear = () => setChoice(null);

  const choose = (next: Choice | null) => {
    setChoice(next);
    if (next) outlets.onChoose?.(next.pointId);
  };
  const under = (event: PointerEvent): Choice | null => {
    const { x, y } = drag.place(event);
    const near = nearestMark(layers, x, y, REACH_PX);
    return near && { curveKey: near.curve.key, pointId: near.mark.point.pointId };
  };
  const onMagnify = (factor: number) => {
    const next = magnify(window, factor, active ? placeInPlot(active.mark, frame) : undefined);
    if (next) outlets.onZoom(next);
  };

  return {
    choice,
    active,
    clear,
    onMagnify,
    dragBox: drag.box,
    onKeyDown: chartKeyHandler({
      curves: layers,
      choice,
      onChoose: choose,
      onClear: drag.box ? drag.cancel : clear,
      onMagnify,
      onWhole: () => outlets.onZoom(null),
    }),
    /** For the drawing itself. */
    pointer: {
      onPointerDown: drag.onPointerDown,
      onPointerMove: (event: PointerEvent<SVGSVGElement>) =>
        drag.box ? drag.onPointerMove(event) : setChoice(under(event)),
      onPointerUp: (event: PointerEvent<SVGSVGElement>) => {
        if (!drag.onPointerUp()) choose(under(event));
      },
      onPointerCancel: drag.cancel,
      // A finger that is lifted has left too; what it tapped stays.
      onPointerLeave: (event: PointerEvent) => event.pointerType !== 'touch' && !drag.box && clear(),
    },
  };
}

/** Fractions of the plot from its left and its top. */
const placeInPlot = ({ x, y }: Pick<Mark, 'x' | 'y'>, { left, right, top, bottom }: Frame) => ({
  x: Math.min(1, Math.max(0, (x - left) / (right - left))),
  y: Math.min(1, Math.max(0, (y - top) / (bottom - top))),
});

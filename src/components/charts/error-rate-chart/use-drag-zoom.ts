import { type PointerEvent, type RefObject, useState } from 'react';
import { type ChartWindow, tidyWindow } from './domain.ts';
import type { Frame } from './frame.ts';

interface Corner {
  x: number;
  y: number;
}

export interface DragBox {
  from: Corner;
  to: Corner;
}

const LEAST_DRAG_PX = 10;

/** Zoom by drawing a box with mouse or pen; a finger keeps scrolling the page and uses the buttons. A flat box zooms
 *  the channel axis alone, an upright one the rate axis alone. */
export function useDragZoom(
  svg: RefObject<SVGSVGElement | null>,
  frame: Frame,
  window: ChartWindow,
  onZoom: (window: ChartWindow) => void,
) {
  const [box, setBox] = useState<DragBox | null>(null);

  const place = (event: PointerEvent): Corner => {
    const bounds = svg.current!.getBoundingClientRect();
    const scale = bounds.width > 0 ? frame.width / bounds.width : 1;
    return { x: (event.clientX - bounds.left) * scale, y: (event.clientY - bounds.top) * scale };
  };
  const within = ({ x, y }: Corner): Corner => ({
    x: Math.min(frame.right, Math.max(frame.left, x)),
    y: Math.min(frame.bottom, Math.max(frame.top, y)),
  });

  return {
    box,
    place,
    cancel: () => setBox(null),
    onPointerDown(event: PointerEvent<SVGSVGElement>) {
      if (event.pointerType === 'touch' || event.button !== 0) return;
      const at = place(event);
      if (at.x < frame.left || at.x > frame.right || at.y < frame.top || at.y > frame.bottom) return;
      event.currentTarget.setPointerCapture?.(event.pointerId);
      setBox({ from: at, to: at });
    },
    onPointerMove(event: PointerEvent<SVGSVGElement>) {
      if (box) setBox({ ...box, to: within(place(event)) });
    },
    /** Whether it was a drag that zoomed; otherwise the press was a click. */
    onPointerUp(): boolean {
      const chosen = box && windowOfBox(box, frame, window);
      setBox(null);
      if (chosen) onZoom(chosen);
      return chosen !== null;
    },
  };
}

/** The window a box frames; null for a box too small to be meant. */
export function windowOfBox(box: DragBox, frame: Frame, window: ChartWindow): ChartWindow | null {
  const [x0, x1] = [Math.min(box.from.x, box.to.x), Math.max(box.from.x, box.to.x)];
  const [y0, y1] = [Math.min(box.from.y, box.to.y), Math.max(box.from.y, box.to.y)];
  const wide = x1 - x0 >= LEAST_DRAG_PX;
  const tall = y1 - y0 >= LEAST_DRAG_PX;
  if (!wide && !tall) return null;
  return tidyWindow({
    pMax: wide ? frame.x.invert(x0) : window.pMax,
    pMin: wide ? frame.x.invert(x1) : window.pMin,
    top: tall ? frame.y.invert(y0) : window.top,
    bottom: tall ? frame.y.invert(y1) : window.bottom,
  });
}

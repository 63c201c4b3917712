import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { coloursOf } from './colours.ts';
import { onesIn } from './density.ts';
import { listenForGestures } from './gestures.ts';
import { paint, type Scene } from './paint.ts';
import { createTileStore } from './tile-store.ts';
import {
  type CellRange,
  cellsUnder,
  type Frame,
  panBy,
  settle,
  type View,
  viewFromText,
  viewToText,
  visibleCells,
  wholeView,
  zoomAt,
} from './view.ts';

/** What the plot tells the page after each frame in which something changed. */
export interface PlotState {
  visible: CellRange;
  /** CSS pixels a cell. */
  cellPixels: number;
  whole: boolean;
  /** The cells under the pointer, or under the middle after a key, and their ones. */
  under: (CellRange & { ones: number }) | null;
  /** For an address. */
  viewText: string;
}

export interface Plot {
  zoom(factor: number): void;
  whole(): void;
  /** The canvas's box changed: CSS pixels and device pixels a CSS pixel. */
  resize(width: number, height: number, ratio: number): void;
  /** The ground changed. */
  recolour(): void;
  close(): void;
}

/** Draws a matrix on a canvas and answers gestures; one frame is drawn per animation frame, and only when needed. */
export function openPlot(
  canvas: HTMLCanvasElement,
  surface: HTMLElement,
  H: SparseMatrix,
  options: { start?: string | null; onState: (state: PlotState) => void },
): Plot | null {
  const context = canvas.getContext('2d', { alpha: false });
  if (!context) return null;
  const frame: Frame = { width: canvas.width, height: canvas.height, rows: H.rows, cols: H.cols };
  let ratio = 1;
  let view: View = wholeView(frame);
  let wanted: string | null = options.start ?? null;
  let pointed: { px: number; py: number } | null = null;
  let waiting = 0;

  const scene: Scene = {
    context,
    H,
    frame,
    colours: coloursOf(canvas),
    tiles: createTileStore(H, () => scene.colours.ink),
    now: () => performance.now(),
  };

  const report = () => {
    const under = pointed && cellsUnder(view, frame, pointed.px, pointed.py);
    options.onState({
      visible: visibleCells(view, frame),
      cellPixels: view.scale / ratio,
      whole: view.scale <= wholeView(frame).scale * 1.0001,
      under: under && { ...under, ones: onesIn(H, under) },
      viewText: viewToText(view, frame),
    });
  };
  const drawFrame = () => {
    waiting = 0;
    const complete = paint(scene, view);
    report();
    if (!complete) request();
  };
  const request = () => {
    waiting ||= requestAnimationFrame(drawFrame);
  };
  const show = (next: View): boolean => {
    const changed = next.x !== view.x || next.y !== view.y || next.scale !== view.scale;
    view = next;
    if (changed) request();
    return changed;
  };

  const stopListening = listenForGestures(surface, {
    pan: (dx, dy) => void show(panBy(view, frame, dx, dy)),
    zoom: (factor, px, py) => show(zoomAt(view, frame, factor, px, py)),
    whole: () => void show(wholeView(frame)),
    point: (at) => {
      pointed = at;
      request();
    },
    size: () => ({ width: frame.width, height: frame.height }),
  });

  return {
    zoom: (factor) => void show(zoomAt(view, frame, factor, frame.width / 2, frame.height / 2)),
    whole: () => void show(wholeView(frame)),
    resize(width, height, pixelRatio) {
      const wasWhole = view.scale <= wholeView(frame).scale * 1.0001;
      const grown = (width * pixelRatio) / Math.max(1, frame.width);
      ratio = pixelRatio;
      frame.width = canvas.width = Math.max(1, Math.round(width * pixelRatio));
      frame.height = canvas.height = Math.max(1, Math.round(height * pixelRatio));
      view =
        viewFromText(wanted, frame) ??
        (wasWhole ? wholeView(frame) : settle({ ...view, scale: view.scale * grown }, frame));
      wanted = null;
      request();
    },
    recolour() {
      scene.colours = coloursOf(canvas);
      scene.tiles.clear();
      // Whole and at once, since a page about to be printed draws no further frame.
      while (!paint(scene, view));
      report();
    },
    close() {
      stopListening();
      cancelAnimationFrame(waiting);
      scene.tiles.clear();
    },
  };
}

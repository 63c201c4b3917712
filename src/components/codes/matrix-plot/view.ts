/** What part of a matrix a plot shows. Lengths are device pixels on the canvas, cells on the matrix. */
export interface View {
  /** Matrix column and row at the canvas's top left corner, fractional. */
  x: number;
  y: number;
  /** Device pixels a cell. */
  scale: number;
}

export interface Frame {
  /** Canvas size in device pixels. */
  width: number;
  height: number;
  rows: number;
  cols: number;
}

/** The largest cell drawn, in device pixels. */
export const LARGEST_CELL = 48;

export const wholeScale = ({ width, height, rows, cols }: Frame): number =>
  Math.min(LARGEST_CELL, width / cols, height / rows);

/** The whole matrix, centred. */
export function wholeView(frame: Frame): View {
  return settle({ x: 0, y: 0, scale: wholeScale(frame) }, frame);
}

/** Keeps the scale within its limits and the matrix on the canvas; a side that fits is centred. */
export function settle(view: View, frame: Frame): View {
  const scale = Math.min(LARGEST_CELL, Math.max(wholeScale(frame), view.scale));
  return {
    x: settleSide(view.x, frame.cols, frame.width / scale),
    y: settleSide(view.y, frame.rows, frame.height / scale),
    scale,
  };
}

function settleSide(start: number, cells: number, shown: number): number {
  if (shown >= cells) return (cells - shown) / 2;
  return Math.min(cells - shown, Math.max(0, start));
}

/** Zooms by a factor about a point of the canvas, which keeps its cell. */
export function zoomAt(view: View, frame: Frame, factor: number, px: number, py: number): View {
  const scale = Math.min(LARGEST_CELL, Math.max(wholeScale(frame), view.scale * factor));
  const x = view.x + px / view.scale - px / scale;
  const y = view.y + py / view.scale - py / scale;
  return settle({ x, y, scale }, frame);
}

/** Moves what is shown by so many pixels; dragging right moves the view left. */
export function panBy(view: View, frame: Frame, dx: number, dy: number): View {
  return settle({ ...view, x: view.x - dx / view.scale, y: view.y - dy / view.scale }, frame);
}

export interface CellRange {
  row0: number;
  row1: number;
  col0: number;
  col1: number;
}

/** Rows row0 ≤ r < row1 and columns col0 ≤ c < col1 that are at least partly on the canvas. */
export function visibleCells(view: View, frame: Frame): CellRange {
  return {
    row0: Math.max(0, Math.floor(view.y)),
    row1: Math.min(frame.rows, Math.ceil(view.y + frame.height / view.scale)),
    col0: Math.max(0, Math.floor(view.x)),
    col1: Math.min(frame.cols, Math.ceil(view.x + frame.width / view.scale)),
  };
}

/** The cells under one pixel: one cell when cells are pixels or larger, a square of them otherwise; null outside. */
export function cellsUnder(view: View, frame: Frame, px: number, py: number): CellRange | null {
  const side = 2 ** levelFor(view.scale);
  const col0 = Math.floor((view.x + px / view.scale) / side) * side;
  const row0 = Math.floor((view.y + py / view.scale) / side) * side;
  if (col0 < 0 || row0 < 0 || col0 >= frame.cols || row0 >= frame.rows) return null;
  return { row0, row1: Math.min(frame.rows, row0 + side), col0, col1: Math.min(frame.cols, col0 + side) };
}

/** Which level of detail is drawn: squares of 2^level cells stand for a pixel, so that one is 0.7 to 1.4 pixels. */
export function levelFor(scale: number): number {
  return scale >= 1 ? 0 : Math.max(0, Math.round(Math.log2(1 / scale)));
}

/** A view as text for an address: centre column, centre row, pixels a cell; and back. */
export function viewToText(view: View, frame: Frame): string {
  const cx = view.x + frame.width / view.scale / 2;
  const cy = view.y + frame.height / view.scale / 2;
  return [cx, cy, view.scale].map((n) => Number(n.toPrecision(6))).join('_');
}

export function viewFromText(text: string | null, frame: Frame): View | null {
  const [cx, cy, scale] = (text ?? '').split('_').map(Number);
  if (!Number.isFinite(cx) || !Number.isFinite(cy) || !Number.isFinite(scale) || scale! <= 0) return null;
  const kept = Math.min(LARGEST_CELL, Math.max(wholeScale(frame), scale!));
  return settle({ x: cx! - frame.width / kept / 2, y: cy! - frame.height / kept / 2, scale: kept }, frame);
}

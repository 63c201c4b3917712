import { type ScaleLogarithmic, scaleLog } from 'd3-scale';
import type { ChartWindow } from './domain.ts';

/** Where the plot lies in the drawing, and the scales that place things in it. All lengths in pixels. */
export interface Frame {
  width: number;
  height: number;
  left: number;
  right: number;
  top: number;
  bottom: number;
  /** Curves end in a letter, and axis names are short. */
  isNarrow: boolean;
  x: ScaleLogarithmic<number, number>;
  y: ScaleLogarithmic<number, number>;
}

const NARROW_BELOW = 560;
/** Too narrow for names beside the curves. */
export const isNarrowWidth = (width: number): boolean => width < NARROW_BELOW;

const LABEL_GAP = 12;
/** The plot keeps this share of the width whatever the labels ask for. */
const LEAST_PLOT_SHARE = 0.55;

/** Mean advance of the label face at its size; only used to keep room, never to place. */
export const labelWidth = (text: string): number => text.length * 6.9;

interface LabelRoom {
  p: number;
  text: string;
}

export function chartFrame(width: number, window: ChartWindow, labels: readonly LabelRoom[]): Frame {
  const isNarrow = isNarrowWidth(width);
  const height = isNarrow ? Math.max(320, width * 0.95) : Math.min(620, Math.max(380, width * 0.56));
  const left = isNarrow ? 42 : 66;
  const rightMost = plotRight(width, left, window, labels);
  const top = isNarrow ? 30 : 22;
  const bottom = height - (isNarrow ? 48 : 56);
  return {
    width,
    height,
    left,
    right: rightMost,
    top,
    bottom,
    isNarrow,
    x: scaleLog().domain([window.pMax, window.pMin]).range([left, rightMost]),
    y: scaleLog().domain([window.top, window.bottom]).range([top, bottom]),
  };
}

/** The right edge that leaves every end label its room. A label starts a little after its point, which itself moves
 *  with the edge; the largest edge for which all fit follows from one inequality a label. */
function plotRight(width: number, left: number, window: ChartWindow, labels: readonly LabelRoom[]): number {
  let plot = width - left - 18;
  for (const { p, text } of labels) {
    const share = Math.log(window.pMax / p) / Math.log(window.pMax / window.pMin);
    if (share <= 0 || share > 1) continue;
    plot = Math.min(plot, (width - 4 - left - LABEL_GAP - labelWidth(text)) / share);
  }
  return left + Math.max(plot, width * LEAST_PLOT_SHARE);
}

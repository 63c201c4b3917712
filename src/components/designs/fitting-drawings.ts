import type { DesignOutline } from '@/core/designs/questions/question.ts';
import type { DrawingKind } from './use-design-address.ts';

/** Most points whose complete graph can be read, and most that can be listed at the side of a drawing. */
const MOST_GRAPH_POINTS = 40;
const MOST_LISTED_POINTS = 64;
/** Most dots of an incidence drawing. */
const MOST_DOTS = 9000;

/** Drawings that fit a design, the most telling one first: for t = 2 the complete graph, for other small ones points
 *  against blocks, and the zoomable plot for all. */
export function fittingDrawings({ v, b, k, t, partialLinear, holds }: DesignOutline, grouped: boolean): DrawingKind[] {
  const graph = grouped && holds && t === 2 && !partialLinear && v <= MOST_GRAPH_POINTS;
  const incidence = grouped && v <= MOST_LISTED_POINTS && b * (k ?? v) <= MOST_DOTS;
  return [...(graph ? ['graph' as const] : []), ...(incidence ? ['incidence' as const] : []), 'plot'];
}

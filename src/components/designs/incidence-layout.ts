import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { type BlockGroups, membersOf } from './block-groups.ts';

export const columnStep = 11;
export const rowStep = 14;
export const margin = { left: 34, top: 26, right: 12, bottom: 26 };
/** Between the columns of two groups. */
const groupGap = 12;

export interface IncidenceLayout {
  width: number;
  height: number;
  /** Middle of each block's column, by block. */
  x: Float64Array;
  /** Block of each column, from the left. */
  order: number[];
  /** Where each group's columns begin and end. */
  spans: { group: number; from: number; to: number }[];
}

/** Points are rows and blocks columns, group by group. */
export function incidenceLayout(design: BlockDesign, groups: BlockGroups): IncidenceLayout {
  const x = new Float64Array(design.b);
  const order: number[] = [];
  const spans: IncidenceLayout['spans'] = [];
  let at = margin.left;
  membersOf(groups).forEach((members, group) => {
    if (group > 0) at += groupGap;
    const from = at;
    for (const block of members) {
      x[block] = at + columnStep / 2;
      order.push(block);
      at += columnStep;
    }
    spans.push({ group, from, to: at });
  });
  return { width: at + margin.right, height: yOf(design.v - 1) + margin.bottom, x, order, spans };
}

export const yOf = (point: number) => margin.top + rowStep * (point + 0.5);

/** The block of the column under a place of the drawing, or null beside all columns. */
export function blockAt({ order, x }: IncidenceLayout, at: number): number | null {
  const found = order.find((block) => Math.abs(x[block]! - at) <= columnStep / 2);
  return found ?? null;
}

/** A group's blocks as one path of upright lines from the first point to the last, and one of dots on the points. */
export function groupMarks(design: BlockDesign, layout: IncidenceLayout, members: readonly number[]) {
  let lines = '';
  let dots = '';
  for (const block of members) {
    const points = blockOf(design, block);
    if (points.length === 0) continue;
    const x = layout.x[block]!;
    lines += `M${x} ${yOf(points[0]!)}V${yOf(points.at(-1)!)}`;
    for (const p of points) dots += `M${x} ${yOf(p)}h0`;
  }
  return { lines, dots };
}

import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import type { BlockGroups } from './block-groups.ts';

export const side = 640;
const middle = side / 2;
const radius = 272;
const labelRadius = 300;
/** Between two lines that join the same two points, in the drawing's units. */
const bow = 14;

export type Place = readonly [x: number, y: number];

/** Points evenly on a circle, the first on top. */
export function placeOf(point: number, v: number, at: 'point' | 'label' = 'point'): Place {
  const angle = (2 * Math.PI * point) / v - Math.PI / 2;
  const length = at === 'point' ? radius : labelRadius;
  return [middle + length * Math.cos(angle), middle + length * Math.sin(angle)];
}

/** One path a group: every line of the complete graph belongs to the block that its two points lie in. Where λ blocks
 *  share two points, their lines bow apart. */
export function groupPaths(design: BlockDesign, groups: BlockGroups, lambda: number): string[] {
  const paths = new Array<string>(groups.count).fill('');
  const drawn = new Map<number, number>();
  for (let i = 0; i < design.b; i++) paths[groups.of[i]!] += linesOf(design, i, lambda, drawn);
  return paths;
}

/** The lines of one block alone, straight. */
export const blockPath = (design: BlockDesign, block: number): string => linesOf(design, block, 1, new Map());

function linesOf(design: BlockDesign, block: number, lambda: number, drawn: Map<number, number>): string {
  const points = blockOf(design, block);
  let path = '';
  for (let i = 1; i < points.length; i++) {
    for (let j = 0; j < i; j++) {
      const pair = points[j]! * design.v + points[i]!;
      const before = drawn.get(pair) ?? 0;
      drawn.set(pair, before + 1);
      path += line(placeOf(points[j]!, design.v), placeOf(points[i]!, design.v), (before - (lambda - 1) / 2) * bow);
    }
  }
  return path;
}

function line([x0, y0]: Place, [x1, y1]: Place, aside: number): string {
  const from = `M${short(x0)} ${short(y0)}`;
  if (aside === 0) return `${from}L${short(x1)} ${short(y1)}`;
  const length = Math.hypot(x1 - x0, y1 - y0);
  const x = (x0 + x1) / 2 - ((y1 - y0) / length) * 2 * aside;
  const y = (y0 + y1) / 2 + ((x1 - x0) / length) * 2 * aside;
  return `${from}Q${short(x)} ${short(y)} ${short(x1)} ${short(y1)}`;
}

const short = (value: number) => String(Math.round(value * 10) / 10);

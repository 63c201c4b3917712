import type { CurveMarks, Mark } from './marks.ts';

/** A point chosen by its curve and id, so that it stays chosen while the curve grows. */
export interface Choice {
  curveKey: string;
  pointId: string;
}

/** Where an arrow key leads from the chosen point: left and right along the curve (towards worse and better channels),
 *  up and down to the nearest point of the neighbouring curve, Home and End to the ends. With nothing chosen, any of
 *  them starts at the first point. Null when the key means nothing here. */
export function walk(curves: readonly CurveMarks[], choice: Choice | null, key: string): Choice | null {
  const walkable = curves.filter((curve) => curve.inside.length > 0);
  const first = walkable[0];
  if (first === undefined || !KEYS.has(key)) return null;
  const row = walkable.findIndex(({ curve }) => curve.key === choice?.curveKey);
  const here = walkable[row];
  const at = here?.inside.findIndex((mark) => mark.point.pointId === choice?.pointId) ?? -1;
  if (here === undefined || at < 0) return choose(first, 0);
  switch (key) {
    case 'ArrowLeft':
      return choose(here, Math.max(0, at - 1));
    case 'ArrowRight':
      return choose(here, Math.min(here.inside.length - 1, at + 1));
    case 'Home':
      return choose(here, 0);
    case 'End':
      return choose(here, here.inside.length - 1);
    default: {
      const step = key === 'ArrowUp' ? -1 : 1;
      const next = walkable[(row + step + walkable.length) % walkable.length]!;
      return choose(next, nearestIndex(next.inside, here.inside[at]!.x));
    }
  }
}

const KEYS = new Set(['ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown', 'Home', 'End']);

const choose = ({ curve, inside }: CurveMarks, index: number): Choice => ({
  curveKey: curve.key,
  pointId: inside[index]!.point.pointId,
});

const nearestIndex = (marks: readonly Mark[], x: number): number =>
  marks.reduce((best, mark, i) => (Math.abs(mark.x - x) < Math.abs(marks[best]!.x - x) ? i : best), 0);

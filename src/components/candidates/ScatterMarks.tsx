import { memo } from 'react';
import type { MapCell } from '@/core/catalogue/map.ts';
import type { ScatterScale } from './scatter-scale.ts';

const structures = ['none', 'quasi-cyclic', 'cyclic'] as const;

/** All marks of a kind in one path, since there can be thousands: hollow for one candidate, filled for several. */
export const ScatterMarks = memo(function ScatterMarks({
  cells,
  scale,
}: {
  cells: readonly MapCell[];
  scale: ScatterScale;
}) {
  const size = cells.length > 1500 ? 2 : cells.length > 400 ? 3 : 4;
  return (
    <g strokeWidth={cells.length > 1500 ? 0.7 : 1.1} className="stroke-ink">
      {structures.flatMap((structure) =>
        [false, true].map((several) => {
          const kind = cells.filter((cell) => cell.structure === structure && cell.count > 1 === several);
          return (
            <path
              key={`${structure} ${several}`}
              d={kind.map(({ n, rate }) => markPath(structure, scale.x(n), scale.y(rate), size)).join('')}
              className={several ? 'fill-quiet' : 'fill-sheet'}
              data-marks={structure}
            />
          );
        }),
      )}
    </g>
  );
});

/** A ring, a box or a triangle about a place. */
export function markPath(structure: MapCell['structure'], x: number, y: number, r: number): string {
  const [cx, cy] = [round(x), round(y)];
  if (structure === 'cyclic') return `M${cx - r} ${cy}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0Z`;
  if (structure === 'quasi-cyclic') return `M${cx - r} ${cy - r}h${2 * r}v${2 * r}h${-2 * r}Z`;
  return `M${cx} ${cy - r}l${r} ${2 * r}h${-2 * r}Z`;
}

const round = (value: number) => Math.round(value * 10) / 10;

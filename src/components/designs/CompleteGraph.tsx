import { useMemo } from 'react';
import { curveColour } from '@/components/charts/palette.ts';
import { classes } from '@/components/ui/classes.ts';
import { counted } from '@/components/ui/numbers.ts';
import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { type BlockGroups, groupName } from './block-groups.ts';
import { blockPath, groupPaths, placeOf, side } from './complete-graph.ts';
import { groupStyle } from './group-style.ts';

interface Props {
  design: BlockDesign;
  groups: BlockGroups;
  lambda: number;
  shown: number | null;
  chosen: number | null;
}

/** Every pair of points is a line, and each line belongs to a block: one colour and line pattern a class. */
export function CompleteGraph({ design, groups, lambda, shown, chosen }: Props) {
  const paths = useMemo(() => groupPaths(design, groups, lambda), [design, groups, lambda]);
  const marked = chosen === null ? null : new Set(blockOf(design, chosen));
  return (
    <figure className="border border-rule bg-sheet">
      <svg
        viewBox={`0 0 ${side} ${side}`}
        className="mx-auto block w-full max-w-176"
        role="img"
        aria-label={describe(design, groups, lambda)}
      >
        {paths.map((d, group) => {
          const style = groupStyle(group);
          const faint = chosen !== null || (shown !== null && shown !== group);
          return (
            <path
              // biome-ignore lint/suspicious/noArrayIndexKey: a group is its number
              key={group}
              d={d}
              fill="none"
              stroke={curveColour(style)}
              strokeWidth={shown === group ? 2.4 : 1.5}
              strokeDasharray={style.dash}
              vectorEffect="non-scaling-stroke"
              opacity={faint ? 0.13 : 1}
              data-group={group}
            />
          );
        })}
        {chosen !== null && (
          <path d={blockPath(design, chosen)} fill="none" stroke="var(--act)" strokeWidth="3" data-chosen />
        )}
        {pointsOf(design.v).map((point) => (
          <Point key={point} point={point} v={design.v} marked={marked?.has(point) ?? false} />
        ))}
      </svg>
      <figcaption className="px-3 pb-2 text-quiet text-tiny">
        {lambda === 1
          ? 'Each line joins two points and lies in one block.'
          : `Each two points are joined by ${lambda} lines, one for each block that holds both.`}{' '}
        {groups.kind === 'classes'
          ? 'Lines of one parallel class share a colour and a line pattern.'
          : 'No resolution is known here: blocks that share no point share a colour and a line pattern.'}
      </figcaption>
    </figure>
  );
}

const pointsOf = (v: number) => Array.from({ length: v }, (_, point) => point);

function Point({ point, v, marked }: { point: number; v: number; marked: boolean }) {
  const [cx, cy] = placeOf(point, v);
  const [x, y] = placeOf(point, v, 'label');
  return (
    <g>
      <circle cx={cx} cy={cy} r={marked ? 7 : 4.5} className={marked ? 'fill-act' : 'fill-ink'} />
      <text
        x={x}
        y={y}
        dy="0.35em"
        textAnchor="middle"
        className={classes('font-mono text-[22px] sm:text-[14px]', marked ? 'fill-act font-semibold' : 'fill-ink')}
      >
        {point}
      </text>
    </g>
  );
}

function describe({ v, b }: BlockDesign, groups: BlockGroups, lambda: number): string {
  const whole = lambda === 1 ? 'Complete graph' : `Complete graph, each line ${lambda} times,`;
  const of = groups.kind === 'classes' ? 'parallel class' : 'group';
  const many = groups.kind === 'classes' ? 'parallel classes' : 'groups of blocks without a common point';
  return `${whole} on ${counted(v, 'point')}, split into ${counted(b, 'block')} in ${counted(groups.count, of, many)}, ${groupName(groups, 0)} to ${groupName(groups, groups.count - 1)}. The list of blocks says the same.`;
}

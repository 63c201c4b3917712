import { useMemo } from 'react';
import { curveColour } from '@/components/charts/palette.ts';
import { counted } from '@/components/ui/numbers.ts';
import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { type BlockGroups, membersOf } from './block-groups.ts';
import { groupStyle } from './group-style.ts';
import {
  blockAt,
  columnStep,
  groupMarks,
  type IncidenceLayout,
  incidenceLayout,
  margin,
  rowStep,
  yOf,
} from './incidence-layout.ts';

interface Props {
  design: BlockDesign;
  groups: BlockGroups;
  shown: number | null;
  chosen: number | null;
  onChoose(block: number | null): void;
}

/** Points as lines across, blocks as uprights with a dot on each of their points; groups stand together. */
export function IncidenceDrawing({ design, groups, shown, chosen, onChoose }: Props) {
  const layout = useMemo(() => incidenceLayout(design, groups), [design, groups]);
  const marks = useMemo(
    () => membersOf(groups).map((members) => groupMarks(design, layout, members)),
    [design, groups, layout],
  );
  return (
    <figure className="border border-rule bg-sheet">
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard */}
      <section className="overflow-x-auto" tabIndex={0} aria-label="Drawing of points and blocks, scrolls sideways">
        {/* biome-ignore lint/a11y/useKeyWithClickEvents: the list of blocks does the same by keyboard */}
        <svg
          width={layout.width}
          height={layout.height}
          role="img"
          aria-label={`${counted(design.v, 'point')} against ${counted(design.b, 'block')}: each upright is a block with a dot on each of its points. The list of blocks says the same.`}
          onClick={(event) => {
            const box = event.currentTarget.getBoundingClientRect();
            const block = blockAt(layout, event.clientX - box.left);
            onChoose(block === chosen ? null : block);
          }}
        >
          <Points v={design.v} width={layout.width} />
          {chosen !== null && <Chosen design={design} layout={layout} block={chosen} />}
          {marks.map(({ lines, dots }, group) => (
            <g
              // biome-ignore lint/suspicious/noArrayIndexKey: a group is its number
              key={group}
              stroke={curveColour(groupStyle(group))}
              fill="none"
              opacity={shown !== null && shown !== group ? 0.18 : 1}
              data-group={group}
            >
              <path d={lines} strokeWidth="1.2" />
              <path d={dots} strokeWidth="7" strokeLinecap="round" />
            </g>
          ))}
          <Names layout={layout} />
        </svg>
      </section>
      <figcaption className="px-3 py-2 text-quiet text-tiny">
        Rows are points, uprights are blocks,{' '}
        {groups.kind === 'classes' ? 'by parallel class' : 'by groups without a common point'}; the numbers above are
        those of the {groups.kind === 'classes' ? 'classes' : 'groups'}, below those of every tenth block. A press
        chooses a block.
      </figcaption>
    </figure>
  );
}

function Points({ v, width }: { v: number; width: number }) {
  return (
    <g className="fill-quiet font-mono text-[11px]">
      {Array.from({ length: v }, (_, point) => point).map((point) => (
        <g key={point}>
          <line x1={margin.left} x2={width - margin.right} y1={yOf(point)} y2={yOf(point)} className="stroke-hair" />
          <text x={margin.left - 6} y={yOf(point)} dy="0.35em" textAnchor="end">
            {point}
          </text>
        </g>
      ))}
    </g>
  );
}

function Chosen({ design, layout, block }: { design: BlockDesign; layout: IncidenceLayout; block: number }) {
  const x = layout.x[block]!;
  const points = blockOf(design, block);
  return (
    <g data-chosen>
      <rect
        x={x - columnStep / 2}
        y={margin.top}
        width={columnStep}
        height={rowStep * design.v}
        className="fill-tint stroke-act"
      />
      {[...points].map((p) => (
        <line key={p} x1={margin.left} x2={x} y1={yOf(p)} y2={yOf(p)} className="stroke-act" strokeDasharray="2 3" />
      ))}
    </g>
  );
}

/** Groups are named where their columns are wide enough; blocks every tenth column. */
function Names({ layout: { spans, order, x, height } }: { layout: IncidenceLayout }) {
  return (
    <g className="fill-quiet font-mono text-[11px]" textAnchor="middle">
      {spans
        .filter(({ from, to, group }) => to - from >= 2 * columnStep || String(group).length < 2)
        .map(({ group, from, to }) => (
          <text key={`g${group}`} x={(from + to) / 2} y={margin.top - 9} className="fill-ink">
            {group}
          </text>
        ))}
      {order
        .filter((_, at) => at % 10 === 0)
        .map((block) => (
          <text key={`b${block}`} x={x[block]} y={height - 8}>
            {block}
          </text>
        ))}
    </g>
  );
}

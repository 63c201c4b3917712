import { useVirtualizer } from '@tanstack/react-virtual';
import { useMemo, useRef } from 'react';
import { CurveSwatch } from '@/components/charts/CurveSwatch.tsx';
import { curveColour } from '@/components/charts/palette.ts';
import { Button } from '@/components/ui/Button.tsx';
import { classes } from '@/components/ui/classes.ts';
import { counted } from '@/components/ui/numbers.ts';
import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { type BlockGroups, groupName, membersOf } from './block-groups.ts';
import { groupStyle } from './group-style.ts';

interface Props {
  design: BlockDesign;
  groups: BlockGroups;
  shown: number | null;
  chosen: number | null;
  onShow(group: number | null): void;
}

const rowHeightPx = 44;
/** Points written out in one row; a class of a large design has more than a line can hold. */
const MOST_POINTS_WRITTEN = 120;

/** The classes as coloured rows: a line pattern and a name each, then their blocks. One can be shown alone. */
export function ClassRows({ design, groups, shown, chosen, onShow }: Props) {
  const members = useMemo(() => membersOf(groups), [groups]);
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: groups.count,
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeightPx,
    overscan: 6,
    initialRect: { width: 800, height: 352 },
  });
  const isResolution = groups.kind === 'classes';
  return (
    <section aria-labelledby="classes" className="min-w-0">
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 id="classes">{isResolution ? 'Resolution classes' : 'Groups of blocks without a common point'}</h2>
        {shown !== null && (
          <Button size="small" kind="quiet" onClick={() => onShow(null)}>
            Show all {groups.count}
          </Button>
        )}
      </div>
      <p className="mb-2 text-quiet text-tiny">
        {isResolution
          ? `${counted(groups.count, 'class', 'classes')}, each a partition of the ${counted(design.v, 'point')}; checked on the blocks.`
          : `No resolution is known here. Taken in turn, the blocks fall into ${counted(groups.count, 'group')}; another order may need fewer.`}
      </p>
      <div ref={scroller} className="max-h-88 overflow-y-auto border-ink border-t">
        <ul className="relative" style={{ height: virtual.getTotalSize() }}>
          {virtual.getVirtualItems().map(({ index, start }) => (
            <li
              key={index}
              className="absolute inset-x-0 h-11 border-hair border-b"
              style={{ transform: `translateY(${start}px)` }}
            >
              <button
                type="button"
                aria-pressed={shown === index}
                className={classes(
                  'flex h-full w-full items-center gap-3 border-l-6 px-2 text-left',
                  shown === index ? 'bg-tint' : 'hover:bg-sheet',
                )}
                style={{ borderColor: curveColour(groupStyle(index)) }}
                onClick={() => onShow(shown === index ? null : index)}
              >
                <CurveSwatch style={groupStyle(index)} />
                <span className="w-20 shrink-0 font-semibold">{groupName(groups, index)}</span>
                <span className="truncate font-mono text-tiny">
                  <Blocks design={design} blocks={members[index]!} chosen={chosen} />
                </span>
              </button>
            </li>
          ))}
        </ul>
      </div>
    </section>
  );
}

function Blocks({ design, blocks, chosen }: { design: BlockDesign; blocks: readonly number[]; chosen: number | null }) {
  let written = 0;
  const shown = blocks.filter((block) => {
    written += blockOf(design, block).length;
    return written <= MOST_POINTS_WRITTEN;
  });
  if (shown.length === 0) return <>{counted(blocks.length, 'block')}</>;
  return (
    <>
      {shown.map((block, at) => (
        <span key={block} className="mr-2.5">
          <span className={classes(block === chosen && 'bg-act px-1 text-act-ink')}>
            {blockOf(design, block).join(' ')}
          </span>
          {at + 1 < blocks.length && <span className="text-quiet"> ·</span>}
        </span>
      ))}
      {shown.length < blocks.length && (
        <span className="text-quiet">and {counted(blocks.length - shown.length, 'more', 'more')}</span>
      )}
    </>
  );
}

import { useMemo } from 'react';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { intersectionNumbersOf } from '@/core/designs/intersection-numbers.ts';
import { type BlockGroups, groupName } from './block-groups.ts';

/** Larger designs would hold the page up for longer than a frame or two. */
const MOST_INCIDENCES_MET = 4_000_000;
const MOST_POINTS_WRITTEN = 2000;

/** One block whole: its points, its class, and how many others meet it in how many points. */
export function BlockDetail({
  design,
  groups,
  block,
}: {
  design: BlockDesign;
  groups: BlockGroups | null;
  block: number;
}) {
  const points = blockOf(design, block);
  const meetings = useMemo(
    () => (design.blockPoints.length <= MOST_INCIDENCES_MET ? [...intersectionNumbersOf(design, block)] : null),
    [design, block],
  );
  const rest = points.length - MOST_POINTS_WRITTEN;
  return (
    <TitleBlock
      className="mt-3"
      title={`Block ${block}`}
      rows={[
        { label: 'Block', value: wholeNumber(block), note: counted(points.length, 'point') },
        {
          label: 'Points',
          value: (
            <span className="font-mono font-normal">
              {points.subarray(0, MOST_POINTS_WRITTEN).join(' ')}
              {rest > 0 && ` … and ${wholeNumber(rest)} more`}
            </span>
          ),
        },
        ...(groups?.kind === 'classes' ? [{ label: 'Class', value: groupName(groups, groups.of[block]!) }] : []),
        meetings
          ? {
              label: 'Meets',
              value: meetings.map(meetingText).join(', ') || 'no other block',
              grade: 'computed' as const,
            }
          : { label: 'Meets', value: 'not counted for one block of a design of this size' },
      ]}
    />
  );
}

const meetingText = ([size, count]: [number, number]) =>
  size === 0 ? `${counted(count, 'block')} not at all` : `${counted(count, 'block')} in ${counted(size, 'point')}`;

import { useVirtualizer } from '@tanstack/react-virtual';
import { useDeferredValue, useEffect, useId, useMemo, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { classes } from '@/components/ui/classes.ts';
import { TextField } from '@/components/ui/fields.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';
import { BlockDetail } from './BlockDetail.tsx';
import { type BlockGroups, groupName } from './block-groups.ts';
import { blockFrom, blocksWith, pointsFrom } from './block-search.ts';
import type { DesignAddress } from './use-design-address.ts';

interface Props {
  design: BlockDesign;
  groups: BlockGroups | null;
  shown: number | null;
  chosen: number | null;
  address: DesignAddress;
  change(next: { through?: string; block?: string; class?: string }): void;
  onChoose(block: number | null): void;
}

/** Every block with its points: found by number or by points, walked with the arrow keys. */
export function BlockList({ design, groups, shown, chosen, address, change, onChoose }: Props) {
  const through = useDeferredValue(address.through ?? '');
  const points = pointsFrom(through, design.v);
  const number = blockFrom(address.block ?? '', design.b);
  const listed = useMemo(() => {
    const asked = pointsFrom(through, design.v);
    const wanted = asked.ok ? asked.value : [];
    if (wanted.length === 0 && shown === null) return null;
    return blocksWith(design, wanted, groups && shown !== null ? { of: groups.of, number: shown } : undefined);
  }, [design, groups, shown, through]);
  return (
    <section aria-labelledby="blocks" className="min-w-0">
      <h2 id="blocks" className="mb-2">
        Blocks
      </h2>
      <div className="mb-3 grid gap-3 sm:grid-cols-2">
        <TextField
          label="through points"
          placeholder="3 17"
          inputMode="numeric"
          autoComplete="off"
          value={address.through ?? ''}
          error={points.ok ? null : points.error}
          onChange={(event) => change({ through: event.target.value })}
        />
        <TextField
          label="block number"
          placeholder="0"
          inputMode="numeric"
          autoComplete="off"
          value={address.block ?? ''}
          error={number.ok ? null : number.error}
          onChange={(event) => change({ block: event.target.value })}
        />
      </div>
      <Listing design={design} groups={groups} listed={listed} chosen={chosen} onChoose={onChoose}>
        <p role="status" className="text-quiet text-tiny">
          {summary(design, groups, listed?.length ?? design.b, points.ok ? points.value : [], shown)}
        </p>
      </Listing>
      {chosen !== null && <BlockDetail design={design} groups={groups} block={chosen} />}
    </section>
  );
}

function summary(
  design: BlockDesign,
  groups: BlockGroups | null,
  count: number,
  points: number[],
  shown: number | null,
): string {
  const of = groups && shown !== null ? ` of ${groupName(groups, shown)}` : '';
  if (points.length === 0) return `${counted(count, 'block')}${of}, numbered from 0.`;
  const where = points.length === 1 ? `point ${points[0]}` : `points ${points.join(', ')}`;
  return `${wholeNumber(count)} of ${counted(design.b, 'block')}${of} ${count === 1 ? 'holds' : 'hold'} ${where}.`;
}

const rowHeightPx = 30;
/** Rows that one scroller holds: browsers end at some sixteen million pixels. */
const PAGE = 400_000;

interface ListingProps {
  design: BlockDesign;
  groups: BlockGroups | null;
  /** Blocks listed; null for all. */
  listed: Uint32Array | null;
  chosen: number | null;
  onChoose(block: number | null): void;
  children: React.ReactNode;
}

function Listing({ design, groups, listed, chosen, onChoose, children }: ListingProps) {
  const id = useId();
  const count = listed?.length ?? design.b;
  const blockIn = (place: number) => (listed ? listed[place]! : place);
  const place = chosen === null ? -1 : listed ? listed.indexOf(chosen) : chosen;
  const [page, setPage] = useState(() => Math.floor(Math.max(0, place) / PAGE));
  const first = Math.min(page, Math.floor(Math.max(0, count - 1) / PAGE)) * PAGE;
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: Math.min(PAGE, count - first),
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeightPx,
    overscan: 10,
    initialRect: { width: 800, height: 420 },
  });
  useEffect(() => {
    if (place < 0) return;
    const wanted = Math.floor(place / PAGE);
    setPage(wanted);
    if (wanted * PAGE === first) virtual.scrollToIndex(place - first);
  }, [place, first, virtual.scrollToIndex]);

  const onKeyDown = (event: React.KeyboardEvent) => {
    const steps: Record<string, number> = {
      ArrowDown: 1,
      ArrowUp: -1,
      PageDown: 12,
      PageUp: -12,
      Home: -count,
      End: count,
    };
    const step = steps[event.key];
    if (event.key === 'Escape') onChoose(null);
    if (step === undefined || count === 0) return;
    event.preventDefault();
    const next = place < 0 ? (step > 0 && event.key !== 'End' ? 0 : step < 0 ? 0 : count - 1) : place + step;
    onChoose(blockIn(Math.min(count - 1, Math.max(0, next))));
  };
  const items = virtual.getVirtualItems();
  const optionId = (block: number) => `${id}-${block}`;

  return (
    <>
      <div className="mb-1 flex flex-wrap items-center justify-between gap-x-4">
        {children}
        {count > PAGE && <Pages first={first} count={count} onPage={setPage} />}
      </div>
      <div
        ref={scroller}
        role="listbox"
        aria-label="Blocks; arrow keys choose one"
        aria-activedescendant={place >= 0 ? optionId(chosen!) : undefined}
        tabIndex={0}
        onKeyDown={onKeyDown}
        className="max-h-105 overflow-y-auto border-ink border-t border-b"
      >
        <div role="presentation" className="relative" style={{ height: virtual.getTotalSize() }}>
          {items.map(({ index, start }) => {
            const block = blockIn(first + index);
            return (
              // biome-ignore lint/a11y/useKeyWithClickEvents: the list box takes the keys
              // biome-ignore lint/a11y/useFocusableInteractive: the list box has the focus and names its active row
              <div
                key={block}
                role="option"
                id={optionId(block)}
                aria-selected={block === chosen}
                aria-setsize={count}
                aria-posinset={first + index + 1}
                className={classes(
                  'absolute inset-x-0 flex h-7.5 cursor-pointer items-center gap-4 border-hair border-b px-1 font-mono',
                  block === chosen ? 'bg-tint' : 'hover:bg-sheet',
                )}
                style={{ transform: `translateY(${start}px)` }}
                onClick={() => onChoose(block)}
              >
                <span className="w-16 shrink-0 text-right text-quiet">{wholeNumber(block)}</span>
                {groups?.kind === 'classes' && (
                  <span className="w-20 shrink-0 font-sans text-quiet text-tiny">
                    {groupName(groups, groups.of[block]!)}
                  </span>
                )}
                <span className="truncate">{lineOf(design, block)}</span>
              </div>
            );
          })}
        </div>
        {count === 0 && <p className="px-1 py-3 text-quiet">No block holds all of them.</p>}
      </div>
    </>
  );
}

/** What a line can hold; the chosen block is written out whole beneath the list. */
const MOST_POINTS_IN_LINE = 60;

function lineOf(design: BlockDesign, block: number): string {
  const points = blockOf(design, block);
  const text = points.subarray(0, MOST_POINTS_IN_LINE).join(' ');
  return points.length > MOST_POINTS_IN_LINE ? `${text} …` : text;
}

function Pages({ first, count, onPage }: { first: number; count: number; onPage(page: number): void }) {
  const page = first / PAGE;
  const last = Math.min(count, first + PAGE) - 1;
  return (
    <span className="flex items-center gap-2">
      <Button size="small" disabled={page === 0} onClick={() => onPage(page - 1)}>
        Earlier
      </Button>
      <span className="text-tiny">
        {wholeNumber(first)} to {wholeNumber(last)}
      </span>
      <Button size="small" disabled={last === count - 1} onClick={() => onPage(page + 1)}>
        Later
      </Button>
    </span>
  );
}

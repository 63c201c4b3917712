import { useVirtualizer } from '@tanstack/react-virtual';
import { useEffect, useRef } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { enclosureText } from '@/components/codes/enclosure-text.ts';
import { classes } from '@/components/ui/classes.ts';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { SortColumn } from '@/core/catalogue/query.ts';
import { standingOf, titleOf } from './candidate-words.ts';
import type { FilterState } from './use-filters.ts';

interface Props {
  rows: readonly CandidateRow[];
  matching: number;
  state: FilterState;
  more(): void;
}

const rowHeightPx = 40;
const columns: { key: string; label: string; sort?: SortColumn; number?: boolean }[] = [
  { key: 'construction', label: 'construction' },
  { key: 'n', label: 'n', sort: 'n', number: true },
  { key: 'k', label: 'k', sort: 'k', number: true },
  { key: 'rate', label: 'rate', sort: 'rate', number: true },
  { key: 'girth', label: 'girth', sort: 'girth', number: true },
  { key: 'distance', label: 'distance', sort: 'distance', number: true },
  { key: 'radius', label: 'radius', sort: 'radius', number: true },
  { key: 'structure', label: 'structure' },
  { key: 'standing', label: 'against requirements' },
];
const layout =
  'grid grid-cols-[minmax(15rem,1fr)_5rem_8.5rem_7.5rem_4rem_11rem_4rem_7rem_11rem] items-baseline gap-x-3';

/** The rows in view only, out of tens of thousands; arrow keys move the choice, the head sorts. */
export function CandidateTable({ rows, matching, state, more }: Props) {
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeightPx,
    overscan: 12,
    initialRect: { width: 900, height: 480 },
  });
  const items = virtual.getVirtualItems();
  const last = items.at(-1)?.index ?? 0;
  useEffect(() => {
    if (last >= rows.length - 40) more();
  }, [last, rows.length, more]);

  const chosenIndex = rows.findIndex(({ id }) => id === state.chosen);
  const move = (step: number) => {
    const next = Math.min(rows.length - 1, Math.max(0, chosenIndex + step));
    state.change({ chosen: rows[next]?.id });
    virtual.scrollToIndex(next);
  };
  const onKeyDown = (event: React.KeyboardEvent) => {
    const step = { ArrowDown: 1, ArrowUp: -1, PageDown: 10, PageUp: -10 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    move(step);
  };

  return (
    <div className="overflow-x-auto">
      {/* biome-ignore lint/a11y/useSemanticElements: only the rows in view exist, which a table element cannot say */}
      <div role="table" aria-label="Candidates" aria-rowcount={matching + 1} className="min-w-[64rem]">
        <HeadRow state={state} />
        {/* biome-ignore lint/a11y/useSemanticElements: as above */}
        <div
          ref={scroller}
          role="rowgroup"
          // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
          tabIndex={0}
          onKeyDown={onKeyDown}
          aria-label="Rows; arrow keys choose one"
          className="h-[30rem] overflow-y-auto"
        >
          <div className="relative" style={{ height: virtual.getTotalSize() }}>
            {items.map((item) => {
              const row = rows[item.index]!;
              return (
                <BodyRow
                  key={row.id}
                  row={row}
                  index={item.index}
                  top={item.start}
                  isChosen={row.id === state.chosen}
                  onChoose={() => state.change({ chosen: row.id })}
                />
              );
            })}
          </div>
        </div>
      </div>
    </div>
  );
}

function HeadRow({ state: { filters, change } }: { state: FilterState }) {
  const sorted = filters.sort ?? 'n';
  const isDown = filters.descending === 'true';
  return (
    // biome-ignore lint/a11y/useSemanticElements: as above
    // biome-ignore lint/a11y/useFocusableInteractive: rows are not focused, their buttons are
    <div role="row" className={classes(layout, 'border-ink border-b pr-4')}>
      {columns.map(({ key, label, sort, number }) => (
        // biome-ignore lint/a11y/useSemanticElements: as above
        // biome-ignore lint/a11y/useFocusableInteractive: as above
        <div
          key={key}
          role="columnheader"
          aria-sort={sort && sort === sorted ? (isDown ? 'descending' : 'ascending') : undefined}
          className={classes('py-2 font-semibold text-quiet', number && 'text-right')}
        >
          {sort ? (
            <button
              type="button"
              className="font-semibold hover:text-act"
              onClick={() => change({ sort, descending: sort === sorted && !isDown ? 'true' : '' })}
            >
              {label}
              <span aria-hidden="true">{sort === sorted ? (isDown ? ' ▾' : ' ▴') : ''}</span>
            </button>
          ) : (
            label
          )}
        </div>
      ))}
    </div>
  );
}

interface RowProps {
  row: CandidateRow;
  index: number;
  top: number;
  isChosen: boolean;
  onChoose(): void;
}

function BodyRow({ row, index, top, isChosen, onChoose }: RowProps) {
  const { n, rank, girth, distance, radius, structure } = row;
  const standing = standingOf(row);
  const cell = 'truncate py-2';
  const number = classes(cell, 'text-right font-mono');
  return (
    // biome-ignore lint/a11y/useSemanticElements: as above
    // biome-ignore lint/a11y/useFocusableInteractive: the row's button takes the focus
    <div
      role="row"
      aria-rowindex={index + 2}
      aria-selected={isChosen}
      className={classes(
        layout,
        'absolute inset-x-0 h-10 border-hair border-b',
        isChosen ? 'bg-tint' : 'hover:bg-sheet',
      )}
      style={{ transform: `translateY(${top}px)` }}
    >
      {/* biome-ignore lint/a11y/useSemanticElements: as above */}
      {/* biome-ignore lint/a11y/useFocusableInteractive: its button takes the focus */}
      <div role="rowheader" className={cell}>
        <button
          type="button"
          tabIndex={-1}
          className="max-w-full truncate text-left hover:text-act"
          title={titleOf(row)}
          onClick={onChoose}
        >
          {titleOf(row)}
        </button>
      </div>
      <Cell className={number}>{wholeNumber(n)}</Cell>
      <Cell className={number}>{enclosureText({ lower: n - rank.upper, upper: n - rank.lower })}</Cell>
      <Cell className={number}>{rateText(row)}</Cell>
      <Cell className={number}>{enclosureText(girth)}</Cell>
      <Cell className={classes(number, 'flex justify-end gap-2')}>
        <span className="truncate">{enclosureText(distance)}</span>
        <Grade grade={distance.grade} method={distance.method} />
      </Cell>
      <Cell className={number}>{radius}</Cell>
      <Cell className={cell}>{structure === 'none' ? (row.resolvable ? 'resolvable' : '–') : structure}</Cell>
      <Cell
        className={classes(
          cell,
          'font-semibold',
          standing.kind === 'pass' && 'text-pass',
          standing.kind === 'thin' && 'text-thin',
        )}
      >
        {standing.word}
      </Cell>
    </div>
  );
}

function Cell({ className, children }: { className: string; children: React.ReactNode }) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: as above
    <div role="cell" className={className}>
      {children}
    </div>
  );
}

function rateText({ n, rank }: CandidateRow): string {
  const [least, most] = [1 - rank.upper / n, 1 - rank.lower / n].map((rate) => rate.toFixed(3));
  return least === most ? least! : `${least}–${most}`;
}

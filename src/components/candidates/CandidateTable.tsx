import { useVirtualizer } from '@tanstack/react-virtual';
import { useEffect, useRef } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { useWidth } from '@/components/charts/error-rate-chart/use-width.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { CardRow, cardHeightPx } from './CardRow.tsx';
import { ColumnChoice } from './ColumnChoice.tsx';
import { titleOf } from './candidate-words.ts';
import { HeadRow } from './HeadRow.tsx';
import { OrderChoice } from './OrderChoice.tsx';
import { rowHeightPx, TableRow } from './TableRow.tsx';
import { columnsFor, constructionRem, gapRem, type TableColumn } from './table-columns.tsx';
import type { FilterState } from './use-filters.ts';

interface Props {
  rows: readonly CandidateRow[];
  matching: number;
  state: FilterState;
  more(): void;
  /** A row was pressed, rather than reached by keys. */
  onOpen(): void;
}

/** Below this a row is a card of three lines. */
const cardsBelowPx = 560;
const remPx = 16;
const steps: Record<string, number> = {
  ArrowDown: 1,
  ArrowUp: -1,
  PageDown: 10,
  PageUp: -10,
  Home: Number.NEGATIVE_INFINITY,
  End: Number.POSITIVE_INFINITY,
};

/** The rows in view only, out of tens of thousands; arrow keys move the choice, the head sorts. */
export function CandidateTable({ rows, matching, state, more, onOpen }: Props) {
  const frame = useRef<HTMLElement>(null);
  const width = useWidth(frame, 840);
  const asCards = width < cardsBelowPx;
  const judged = rows.some(({ verdicts }) => verdicts.length > 0);
  const columns = columnsFor(state.columns, width / remPx, judged);
  return (
    <section aria-label="Candidates" className="min-w-0" ref={frame}>
      <div className="mb-1 flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
        <p className="grid gap-1 text-quiet text-tiny">
          {judged && (
            <label className="flex cursor-pointer items-baseline gap-2 text-ink">
              <input
                type="checkbox"
                className="accent-act"
                checked={state.filters.mixed !== 'true'}
                onChange={(event) => state.change({ mixed: event.target.checked ? '' : 'true' })}
              />
              Those that meet everything first
            </label>
          )}
          {rows.length < matching ? `The first ${wholeNumber(rows.length)} are here; more come as you scroll.` : ''}
        </p>
        {asCards ? <OrderChoice state={state} /> : <ColumnChoice state={state} columns={columns} />}
      </div>
      <Body
        key={asCards ? 'cards' : 'rows'}
        rows={rows}
        matching={matching}
        state={state}
        more={more}
        onOpen={onOpen}
        columns={columns}
        asCards={asCards}
      />
    </section>
  );
}

interface BodyProps extends Props {
  columns: readonly TableColumn[];
  asCards: boolean;
}

function Body({ rows, matching, state, more, onOpen, columns, asCards }: BodyProps) {
  const scroller = useRef<HTMLDivElement>(null);
  const heightPx = asCards ? cardHeightPx : rowHeightPx;
  const virtual = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => heightPx,
    overscan: 12,
    initialRect: { width: 900, height: 480 },
  });
  const items = virtual.getVirtualItems();
  const last = items.at(-1)?.index ?? 0;
  useEffect(() => {
    if (last >= rows.length - 40) more();
  }, [last, rows.length, more]);

  const chosenIndex = rows.findIndex(({ id }) => id === state.chosen);
  const onKeyDown = (event: React.KeyboardEvent) => {
    const step = steps[event.key];
    if (event.key === 'Escape') state.change({ chosen: '' });
    if (step === undefined || rows.length === 0) return;
    event.preventDefault();
    const next = Math.min(rows.length - 1, Math.max(0, chosenIndex + step));
    state.change({ chosen: rows[next]!.id });
    virtual.scrollToIndex(next);
  };
  const template = `minmax(${constructionRem}rem,1fr) ${columns.map(({ widthRem }) => `${widthRem}rem`).join(' ')}`;
  const least = columns.reduce((sum, { widthRem }) => sum + widthRem + gapRem, constructionRem);
  const chosen = rows[chosenIndex];

  return (
    <div className="overflow-x-auto">
      {/* biome-ignore lint/a11y/useSemanticElements: only the rows in view exist, which a table element cannot say */}
      <div
        role="table"
        aria-label="Candidates"
        aria-rowcount={matching + 1}
        style={asCards ? undefined : { minWidth: `${least}rem` }}
      >
        {!asCards && <HeadRow state={state} columns={columns} template={template} />}
        {/* biome-ignore lint/a11y/useSemanticElements: as above */}
        <div
          ref={scroller}
          role="rowgroup"
          // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
          tabIndex={0}
          onKeyDown={onKeyDown}
          aria-label="Rows; arrow keys choose one"
          className="max-h-120 overflow-y-auto border-ink border-b"
        >
          <div className="relative" style={{ height: virtual.getTotalSize() }}>
            {items.map((item) => {
              const shared = {
                row: rows[item.index]!,
                index: item.index,
                top: item.start,
                isChosen: rows[item.index]!.id === state.chosen,
                onChoose() {
                  state.change({ chosen: rows[item.index]!.id });
                  onOpen();
                },
              };
              return asCards ? (
                <CardRow key={shared.row.id} {...shared} />
              ) : (
                <TableRow key={shared.row.id} {...shared} columns={columns} template={template} />
              );
            })}
          </div>
        </div>
      </div>
      <p role="status" className="sr-only">
        {chosen ? `Chosen: ${titleOf(chosen)}, row ${wholeNumber(chosenIndex + 1)}` : ''}
      </p>
    </div>
  );
}

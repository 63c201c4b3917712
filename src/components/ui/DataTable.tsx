import { type ReactNode, useMemo, useState } from 'react';
import { classes } from './classes.ts';

export interface Column<Row> {
  key: string;
  header: ReactNode;
  cell: (row: Row) => ReactNode;
  /** Numbers are set right in the mono face so that digits line up. */
  kind?: 'text' | 'number';
  /** Makes the column sortable by this value. */
  sortBy?: (row: Row) => number | string;
}

interface Props<Row> {
  /** Says what the table lists; read aloud, and shown unless hidden. */
  caption: string;
  showCaption?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  selected?: (row: Row) => boolean;
  empty?: ReactNode;
}

type Order = { key: string; down: boolean } | null;

/** A ruled table without boxes: an ink line under the head, hairlines between rows; scrolls sideways when narrow. */
export function DataTable<Row>({ caption, showCaption, columns, rows, rowKey, selected, empty }: Props<Row>) {
  const [order, setOrder] = useState<Order>(null);
  const shown = useMemo(() => sorted(rows, columns, order), [rows, columns, order]);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section className="relative overflow-x-auto" aria-label={caption} tabIndex={0}>
      <table className="w-full border-collapse text-left">
        <caption className={showCaption ? 'mb-2 text-left font-semibold text-lead' : 'sr-only'}>{caption}</caption>
        <thead>
          <tr className="border-ink border-b">
            {columns.map((column) => (
              <HeadCell key={column.key} column={column} order={order} onOrder={setOrder} />
            ))}
          </tr>
        </thead>
        <tbody>
          {shown.map((row) => (
            <tr key={rowKey(row)} className={classes('border-hair border-b', selected?.(row) && 'bg-tint')}>
              {columns.map((column) => (
                <td
                  key={column.key}
                  className={classes(
                    'py-2 pr-4 align-baseline last:pr-1',
                    numeric(column) ? 'text-right font-mono' : 'min-w-32',
                  )}
                >
                  {column.cell(row)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {rows.length === 0 && empty && <div className="py-3 text-quiet">{empty}</div>}
    </section>
  );
}

const numeric = (column: Column<never>) => column.kind === 'number';

interface HeadProps<Row> {
  column: Column<Row>;
  order: Order;
  onOrder: (order: Order) => void;
}

function HeadCell<Row>({ column, order, onOrder }: HeadProps<Row>) {
  const active = order?.key === column.key ? order : null;
  const look = classes(
    'whitespace-nowrap py-2 pr-4 align-bottom font-semibold text-quiet last:pr-1',
    numeric(column) && 'text-right',
  );
  if (!column.sortBy) {
    return (
      <th scope="col" className={look}>
        {column.header}
      </th>
    );
  }
  const arrow = (
    <span aria-hidden="true" className="inline-block w-2 text-tiny">
      {active ? (active.down ? '▾' : '▴') : ''}
    </span>
  );
  return (
    <th scope="col" className={look} aria-sort={active ? (active.down ? 'descending' : 'ascending') : 'none'}>
      <button
        type="button"
        className="inline-flex items-baseline gap-1 font-semibold hover:text-act"
        onClick={() => onOrder({ key: column.key, down: active ? !active.down : false })}
      >
        {numeric(column) && arrow}
        {column.header}
        {!numeric(column) && arrow}
      </button>
    </th>
  );
}

function sorted<Row>(rows: readonly Row[], columns: readonly Column<Row>[], order: Order): readonly Row[] {
  const by = order && columns.find((column) => column.key === order.key)?.sortBy;
  if (!order || !by) return rows;
  const sign = order.down ? -1 : 1;
  return [...rows].sort((a, b) => {
    const x = by(a);
    const y = by(b);
    return sign * (typeof x === 'number' && typeof y === 'number' ? x - y : String(x).localeCompare(String(y)));
  });
}

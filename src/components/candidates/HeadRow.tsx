import { classes } from '@/components/ui/classes.ts';
import { orderOf } from './filters.ts';
import type { TableColumn } from './table-columns.tsx';
import type { FilterState } from './use-filters.ts';

interface Props {
  state: FilterState;
  columns: readonly TableColumn[];
  template: string;
}

/** The head sorts by the columns that the catalogue keeps in order. */
export function HeadRow({ state: { filters, change }, columns, template }: Props) {
  const order = orderOf(filters);
  return (
    // biome-ignore lint/a11y/useSemanticElements: only the rows in view exist, which a table element cannot say
    // biome-ignore lint/a11y/useFocusableInteractive: rows are not focused, their buttons are
    <div
      role="row"
      className="grid items-baseline gap-x-3 border-ink border-b pr-4"
      style={{ gridTemplateColumns: template }}
    >
      <Head>construction</Head>
      {columns.map(({ key, label, sort, number }) => {
        const active = sort !== undefined && sort === order.sort;
        const sorted = active ? (order.descending ? 'descending' : 'ascending') : undefined;
        return (
          <Head key={key} sorted={sorted} number={number}>
            {sort ? (
              <button
                type="button"
                className="whitespace-nowrap font-semibold hover:text-act"
                onClick={() => change({ sort, descending: active ? (order.descending ? '' : 'true') : firstWay(sort) })}
              >
                {label}
                <span aria-hidden="true">{active ? (order.descending ? ' ▾' : ' ▴') : ''}</span>
              </button>
            ) : (
              label
            )}
          </Head>
        );
      })}
    </div>
  );
}

/** Of most figures the largest are wanted first, of lengths and weights the smallest. */
export const firstWay = (sort: string) => (['n', 'columnWeight', 'rowWeight', 'parity'].includes(sort) ? '' : 'true');

interface HeadProps {
  sorted?: 'ascending' | 'descending';
  number?: boolean;
  children: React.ReactNode;
}

function Head({ sorted, number, children }: HeadProps) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: as above
    // biome-ignore lint/a11y/useFocusableInteractive: its button takes the focus
    <div
      role="columnheader"
      aria-sort={sorted}
      className={classes('py-2 font-semibold text-quiet', number && 'text-right')}
    >
      {children}
    </div>
  );
}

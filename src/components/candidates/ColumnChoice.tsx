import { Button } from '@/components/ui/Button.tsx';
import { type TableColumn, tableColumns } from './table-columns.tsx';
import type { FilterState } from './use-filters.ts';

interface Props {
  state: FilterState;
  /** Those shown now. */
  columns: readonly TableColumn[];
}

/** Which columns the table has: as many as fit, or those that are ticked. */
export function ColumnChoice({ state, columns }: Props) {
  const shown = columns.map(({ key }) => key);
  const toggle = (key: string, on: boolean) => {
    const next = tableColumns.map((column) => column.key).filter((name) => (name === key ? on : shown.includes(name)));
    state.change({ columns: next.join(',') || 'none' });
  };
  return (
    <details className="relative text-tiny">
      <summary className="font-semibold text-act">Columns{state.columns ? ', chosen' : ''}</summary>
      <fieldset className="absolute right-0 z-10 mt-1 grid w-56 gap-1 border border-ink bg-sheet p-3">
        <legend className="sr-only">Columns of the table</legend>
        {tableColumns.map(({ key, label }) => (
          <label key={key} className="flex cursor-pointer items-baseline gap-2">
            <input
              type="checkbox"
              className="accent-act"
              checked={shown.includes(key)}
              onChange={(event) => toggle(key, event.target.checked)}
            />
            {label}
          </label>
        ))}
        <Button size="small" kind="quiet" disabled={!state.columns} onClick={() => state.change({ columns: '' })}>
          As many as fit
        </Button>
      </fieldset>
    </details>
  );
}

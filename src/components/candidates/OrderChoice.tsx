import { SelectField } from '@/components/ui/fields.tsx';
import { orderOf } from './filters.ts';
import { firstWay } from './HeadRow.tsx';
import { tableColumns } from './table-columns.tsx';
import type { FilterState } from './use-filters.ts';

const choices = tableColumns
  .filter(({ sort }) => sort)
  .map(({ sort, label }) => ({ value: sort!, label: `${label}, ${firstWay(sort!) ? 'largest' : 'smallest'} first` }));

/** Where there is no head to sort by. */
export function OrderChoice({ state: { filters, change } }: { state: FilterState }) {
  return (
    <SelectField
      label="order"
      className="w-full"
      choices={choices}
      value={orderOf(filters).sort}
      onChange={(event) => change({ sort: event.target.value, descending: firstWay(event.target.value) })}
    />
  );
}

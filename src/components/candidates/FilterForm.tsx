import { useEffect, useState } from 'react';
import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import { listFamilies } from '@/core/designs/design.ts';
import { type FilterName, filterFields, statedBehind } from './filters.ts';
import type { FilterState } from './use-filters.ts';

interface Props {
  state: FilterState;
  errors: Partial<Record<string, string>>;
}

const structures = [
  { value: '', label: 'any structure' },
  { value: 'cyclic', label: 'cyclic' },
  { value: 'quasi-cyclic', label: 'cyclic or quasi-cyclic' },
];
const resolvability = [
  { value: '', label: 'either' },
  { value: 'true', label: 'resolvable' },
];
const grid = 'grid grid-cols-2 gap-x-4 gap-y-3 sm:grid-cols-3 lg:grid-cols-5';

/** The window of the search. Fields are read as they are typed; what cannot be read says so and is left out. */
export function FilterForm({ state, errors }: Props) {
  const { filters, change } = state;
  const families = [
    { value: '', label: 'every family' },
    ...listFamilies().map(({ id, title }) => ({ value: id, label: title })),
  ];
  const typed = (first: boolean) =>
    filterFields
      .filter((field) => field.first === first)
      .map(({ name, label, hint }) => (
        <TypedFilter key={name} name={name} label={label} placeholder={hint} error={errors[name]} state={state} />
      ));
  const behind = statedBehind(filters);
  const isRefused = filterFields.some(({ first, name }) => !first && errors[name]);
  return (
    <search>
      <form aria-label="Search window" onSubmit={(event) => event.preventDefault()} className="grid gap-3">
        <div className={grid}>
          {typed(true)}
          <SelectField
            label="structure"
            choices={structures}
            value={filters.structure ?? ''}
            onChange={(event) => change({ structure: event.target.value })}
          />
        </div>
        <details open={isRefused || undefined}>
          <summary className="w-fit text-act">
            <span className="font-semibold">More of the window</span>
            {behind.length > 0 && <span className="text-ink">: {behind.join(', ')}</span>}
          </summary>
          <div className={`${grid} mt-3`}>
            {typed(false)}
            <SelectField
              label="resolution"
              choices={resolvability}
              value={filters.resolvable ?? ''}
              onChange={(event) => change({ resolvable: event.target.value })}
            />
            <SelectField
              label="family"
              className="col-span-2"
              choices={families}
              value={filters.families ?? ''}
              onChange={(event) => change({ families: event.target.value })}
            />
          </div>
        </details>
      </form>
    </search>
  );
}

interface TypedProps {
  name: FilterName;
  label: string;
  placeholder: string;
  error: string | undefined;
  state: FilterState;
}

/** Keeps what is typed at once and the address a moment later, so that typing never waits. */
function TypedFilter({ name, label, placeholder, error, state: { filters, change } }: TypedProps) {
  const stored = filters[name] ?? '';
  const [text, setText] = useState(stored);
  useEffect(() => setText(stored), [stored]);
  useEffect(() => {
    if (text === stored) return;
    const timer = setTimeout(() => change({ [name]: text.trim() }), 250);
    return () => clearTimeout(timer);
  }, [text, stored, name, change]);
  return (
    <NumberField
      label={label}
      inputMode="text"
      placeholder={placeholder}
      error={error}
      value={text}
      onChange={(event) => setText(event.target.value)}
    />
  );
}

import { useEffect, useId, useRef } from 'react';
import { classes } from './classes.ts';

interface Props<V extends string> {
  legend: string;
  value: V;
  choices: readonly { value: V; label: string; note?: string }[];
  onChange: (value: V) => void;
  disabled?: boolean;
  /** Many choices stand in columns of one width, a few share the row. */
  columns?: boolean;
  className?: string;
}

/** A few exclusive choices side by side: radio buttons that look like cells of one ruled strip. */
export function ChoiceGroup<V extends string>({
  legend,
  value,
  choices,
  onChange,
  disabled,
  columns,
  className,
}: Props<V>) {
  const name = useId();
  const strip = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const chosen = strip.current?.querySelector('input:checked')?.closest('label');
    if (strip.current && chosen) strip.current.scrollTop = chosen.offsetTop - chosen.offsetHeight;
  }, []);
  return (
    <fieldset className={classes('min-w-0', className)} disabled={disabled}>
      <legend className="mb-1 text-quiet text-tiny">{legend}</legend>
      <div
        ref={strip}
        className={classes(
          'relative border-rule border-t border-l',
          columns
            ? 'grid grid-cols-[repeat(auto-fill,minmax(min(15rem,100%),1fr))] max-sm:max-h-80 max-sm:overflow-y-auto max-sm:border-b'
            : 'flex flex-wrap',
        )}
      >
        {choices.map((choice) => (
          <label
            key={choice.value}
            className="flex grow cursor-pointer items-start gap-2 border-rule border-r border-b bg-sheet px-3 py-2 has-checked:bg-tint has-focus-visible:outline-2 has-focus-visible:outline-act has-disabled:cursor-not-allowed"
          >
            <input
              type="radio"
              className="mt-1 accent-act outline-none"
              name={name}
              value={choice.value}
              checked={choice.value === value}
              onChange={() => onChange(choice.value)}
            />
            <span>
              <span className="font-semibold">{choice.label}</span>
              {choice.note && <span className="block text-quiet text-tiny">{choice.note}</span>}
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}

import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes, TextareaHTMLAttributes } from 'react';
import { classes } from './classes.ts';
import { Field } from './Field.tsx';

const TEXT = 'w-full min-w-0 py-1 text-ink placeholder:text-quiet aria-invalid:border-fail disabled:text-quiet';
const LINE = `${TEXT} min-h-9 border-0 border-b border-ink px-0.5 font-mono aria-invalid:border-b-2 disabled:border-rule`;

interface Labelled {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | null | undefined;
  /** Of the whole field, not of the control. */
  className?: string;
}

type InputProps = Labelled & Omit<InputHTMLAttributes<HTMLInputElement>, 'className'>;

export function TextField({ label, hint, error, className, required, ...input }: InputProps) {
  return (
    <Field label={label} hint={hint} error={error} required={required} className={className}>
      {(control) => <input type="text" {...input} {...control} className={classes(LINE, 'bg-transparent')} />}
    </Field>
  );
}

/** A number typed as text, so that 1e-9 and a half-typed value are not lost; the schema judges it. */
export function NumberField(props: InputProps) {
  return <TextField inputMode="decimal" autoComplete="off" spellCheck={false} {...props} />;
}

export interface Choice {
  value: string;
  label: string;
  disabled?: boolean;
}

type SelectProps = Labelled &
  Omit<SelectHTMLAttributes<HTMLSelectElement>, 'className'> & { choices: readonly Choice[] };

export function SelectField({ label, hint, error, className, required, choices, ...select }: SelectProps) {
  return (
    <Field label={label} hint={hint} error={error} required={required} className={className}>
      {(control) => (
        <select {...select} {...control} className={classes(LINE, 'bg-ground')}>
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value} disabled={choice.disabled}>
              {choice.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

type AreaProps = Labelled & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'className'>;

export function TextAreaField({ label, hint, error, className, required, ...area }: AreaProps) {
  return (
    <Field label={label} hint={hint} error={error} required={required} className={className}>
      {(control) => (
        <textarea rows={3} {...area} {...control} className={classes(TEXT, 'border border-ink bg-transparent px-2')} />
      )}
    </Field>
  );
}

import { type ReactNode, useId } from 'react';
import { classes } from './classes.ts';

/** What a control needs to be tied to its label, hint and error. */
export interface ControlProps {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
  'aria-required': true | undefined;
}

interface Props {
  label: ReactNode;
  /** Said before anything goes wrong: unit, range, an example. */
  hint?: ReactNode;
  /** Says what would be accepted. */
  error?: string | null | undefined;
  required?: boolean;
  className?: string;
  children: (control: ControlProps) => ReactNode;
}

/** Label above, control, then the error or the hint; the control is told about both. */
export function Field({ label, hint, error, required, className, children }: Props) {
  const id = useId();
  const note = error ? `${id}-error` : hint ? `${id}-hint` : undefined;
  return (
    <div className={classes('grid content-start gap-1', className)}>
      <label htmlFor={id} className="text-tiny text-quiet">
        {label}
      </label>
      {children({
        id,
        'aria-describedby': note,
        'aria-invalid': error ? true : undefined,
        'aria-required': required || undefined,
      })}
      {error ? (
        <p id={note} className="text-fail text-tiny">
          <span className="font-semibold">Not accepted:</span> {error}
        </p>
      ) : (
        hint && (
          <p id={note} className="text-quiet text-tiny">
            {hint}
          </p>
        )
      )}
    </div>
  );
}

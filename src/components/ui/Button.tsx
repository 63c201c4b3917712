import type { AnchorHTMLAttributes, ButtonHTMLAttributes } from 'react';
import { classes } from './classes.ts';

export type ButtonKind = 'primary' | 'outline' | 'quiet';

const BASE =
  'inline-flex items-center justify-center gap-2 border text-center font-semibold leading-tight no-underline transition-colors disabled:opacity-55';
const SIZE = { usual: 'min-h-10 px-4 py-2', small: 'min-h-8 px-2.5 py-1 text-tiny' } as const;
const KIND: Record<ButtonKind, string> = {
  primary:
    'border-act bg-act text-act-ink enabled:hover:border-act-deep enabled:hover:bg-act-deep [a&]:hover:border-act-deep [a&]:hover:bg-act-deep',
  outline: 'border-act bg-sheet text-act enabled:hover:bg-tint [a&]:hover:bg-tint',
  quiet: 'border-transparent text-act enabled:hover:bg-tint [a&]:hover:bg-tint',
};

interface Look {
  kind?: ButtonKind;
  size?: keyof typeof SIZE;
}

export const buttonClass = ({ kind = 'outline', size = 'usual' }: Look, more?: string) =>
  classes(BASE, SIZE[size], KIND[kind], more);

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement>, Look {
  /** At work: stays in place, cannot be pressed again, says so to assistive technology. */
  busy?: boolean;
}

export function Button({ kind, size, busy, className, type = 'button', disabled, ...rest }: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled || busy}
      aria-busy={busy || undefined}
      className={buttonClass({ kind, size }, className)}
    />
  );
}

interface LinkProps extends AnchorHTMLAttributes<HTMLAnchorElement>, Look {}

/** Goes somewhere, looks like a button. */
export function ButtonLink({ kind, size, className, children, ...rest }: LinkProps) {
  return (
    <a {...rest} className={buttonClass({ kind, size }, className)}>
      {children}
    </a>
  );
}

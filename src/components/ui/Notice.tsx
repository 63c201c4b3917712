import type { ReactNode } from 'react';
import { classes } from './classes.ts';

export type NoticeKind = 'note' | 'pass' | 'caution' | 'fail';

const LOOK: Record<NoticeKind, { border: string; word: string }> = {
  note: { border: 'border-quiet', word: 'text-quiet' },
  pass: { border: 'border-pass', word: 'text-pass' },
  caution: { border: 'border-thin', word: 'text-thin' },
  fail: { border: 'border-fail', word: 'text-fail' },
};

interface Props {
  kind: NoticeKind;
  /** The word that carries the kind: "Caution", "Refused", "Saved". Never colour alone. */
  word: string;
  children?: ReactNode;
  /** Said aloud when it appears: assertively for failures, politely otherwise. */
  live?: boolean;
  action?: ReactNode;
  className?: string;
}

export function Notice({ kind, word, children, live, action, className }: Props) {
  const role = live ? (kind === 'fail' ? 'alert' : 'status') : undefined;
  return (
    <div role={role} className={classes('border border-l-4 bg-sheet px-3 py-2', LOOK[kind].border, className)}>
      <span className={classes('font-semibold', LOOK[kind].word)}>{word}.</span> {children}
      {action && <div className="mt-2">{action}</div>}
    </div>
  );
}

import type { Release } from '@/api/releases.ts';
import { classes } from '@/components/ui/classes.ts';

const LOOK: Record<Release['state'], string> = {
  current: 'text-pass',
  superseded: 'text-quiet',
  withdrawn: 'text-fail',
};
const SIGN: Record<Release['state'], string> = { current: '●', superseded: '○', withdrawn: '✕' };

/** Whether a release still holds: a sign and the word, never colour alone. */
export function ReleaseState({ state }: { state: Release['state'] }) {
  return (
    <span className={classes('whitespace-nowrap font-semibold', LOOK[state])}>
      <span aria-hidden="true">{SIGN[state]}</span> {state}
    </span>
  );
}

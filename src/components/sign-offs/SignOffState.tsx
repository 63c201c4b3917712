import type { SignOff } from '@/api/sign-offs.ts';
import { classes } from '@/components/ui/classes.ts';

const LOOK: Record<SignOff['state'], string> = { open: 'text-thin', approved: 'text-pass', returned: 'text-fail' };
const SIGN: Record<SignOff['state'], string> = { open: '○', approved: '●', returned: '✕' };

/** How a sign-off stands: a sign and the word, never colour alone. */
export function SignOffState({ state }: { state: SignOff['state'] }) {
  return (
    <span className={classes('whitespace-nowrap font-semibold', LOOK[state])}>
      <span aria-hidden="true">{SIGN[state]}</span> {state}
    </span>
  );
}

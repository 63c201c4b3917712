import { type SubmitEvent, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { duration } from '@/components/ui/numbers.ts';
import { outcomeFrom, type SignInOutcome, signIn } from './auth-post.ts';

export interface DemoAccount {
  email: string;
  /** What the account may do, in a few words. */
  role: string;
}

interface Props {
  /** Where to go once signed in: a path of this site. */
  next: string;
  /** Local mode only. */
  demo?: { accounts: readonly DemoAccount[]; password: string };
  /** The query of an address that a refused try came back to. */
  refusedWith?: string;
}

function said(outcome: Exclude<SignInOutcome, { ok: true }>): string {
  if (outcome.reason === 'slow-down')
    return `Too many tries. The next one is taken in ${duration(outcome.waitSeconds * 1000)}.`;
  return outcome.reason === 'refused'
    ? 'E-mail and password do not match an account.'
    : 'The server does not answer; try again in a moment.';
}

export default function SignInForm({ next, demo, refusedWith }: Props) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [busy, setBusy] = useState(false);
  const [message, setMessage] = useState<string | null>(
    refusedWith === undefined ? null : said(outcomeFrom(new URLSearchParams(refusedWith))),
  );

  const submit = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    setBusy(true);
    setMessage(null);
    const outcome = await signIn(email, password, next);
    if (outcome.ok) {
      location.assign(outcome.next);
      return;
    }
    setBusy(false);
    setMessage(said(outcome));
  };

  return (
    <div className="grid gap-8">
      <form onSubmit={submit} className="grid gap-5" method="post">
        <TextField
          label="e-mail"
          name="email"
          type="email"
          autoComplete="username"
          required
          value={email}
          onChange={(event) => setEmail(event.target.value)}
        />
        <TextField
          label="password"
          name="password"
          type="password"
          autoComplete="current-password"
          required
          value={password}
          onChange={(event) => setPassword(event.target.value)}
        />
        {message && (
          <Notice kind="fail" word="Not signed in" live>
            {message}
          </Notice>
        )}
        <Button kind="primary" type="submit" busy={busy} disabled={email === '' || password === ''}>
          Sign in
        </Button>
      </form>
      {demo && (
        <section aria-labelledby="demo-accounts">
          <h2 id="demo-accounts">Demonstration accounts</h2>
          <p className="mt-1 text-quiet text-tiny">
            This copy runs in local mode. Each has the password <code className="text-ink">{demo.password}</code>.
          </p>
          <ul className="mt-3 border-rule border-t">
            {demo.accounts.map((account) => (
              <li key={account.email} className="flex items-center justify-between gap-3 border-rule border-b py-1.5">
                <span className="min-w-0">
                  <span className="block truncate font-mono text-tiny">{account.email}</span>
                  <span className="block text-quiet text-tiny">{account.role}</span>
                </span>
                <Button
                  size="small"
                  aria-label={`Fill in ${account.email}`}
                  onClick={() => {
                    setEmail(account.email);
                    setPassword(demo.password);
                    setMessage(null);
                  }}
                >
                  Fill in
                </Button>
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

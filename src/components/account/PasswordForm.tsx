import { type SubmitEvent, useState } from 'react';
import type { z } from 'zod';
import { newPasswordSchema, type passwordChangeSchema } from '@/api/account.ts';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { useSubmission } from './use-submission.ts';

const empty = { current: '', next: '', again: '' };

/** Changes the password; whoever else is signed in with it is signed out. */
export default function PasswordForm({ email }: { email: string }) {
  const [typed, setTyped] = useState(empty);
  const [differ, setDiffer] = useState(false);
  const { busy, fields, failure, done, submit } = useSubmission<
    typeof newPasswordSchema,
    z.output<typeof passwordChangeSchema>
  >(newPasswordSchema);

  const change = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const { current, next, again } = typed;
    setDiffer(next !== again);
    if (next !== again) return;
    const answer = await submit({ current, next }, (body) => call(endpoints.putPassword, { body }));
    if (answer) setTyped(empty);
  };
  const field = (name: keyof typeof empty) => ({
    type: 'password',
    required: true,
    value: typed[name],
    onChange: (event: { target: { value: string } }) =>
      setTyped((before) => ({ ...before, [name]: event.target.value })),
  });

  return (
    <form onSubmit={change} noValidate className="grid max-w-md gap-4">
      {/* Tells a password manager whose password this is. */}
      <input type="text" autoComplete="username" value={email} readOnly hidden />
      <TextField
        label="present password"
        autoComplete="current-password"
        error={fields.current}
        {...field('current')}
      />
      <TextField
        label="new password"
        autoComplete="new-password"
        hint="12 to 200 characters of any kind; a few unrelated words do well"
        error={fields.next}
        {...field('next')}
      />
      <TextField
        label="new password, again"
        autoComplete="new-password"
        error={differ ? 'the new password once more' : null}
        {...field('again')}
      />
      {failure && (
        <Notice kind="fail" word="Not changed" live>
          {failure}
        </Notice>
      )}
      {done && (
        <Notice kind="pass" word="Changed" live>
          {done.sessionsEnded === 0
            ? 'You were signed in nowhere else.'
            : `${counted(done.sessionsEnded, 'other session')} ended.`}{' '}
          API tokens go on; revoke those you no longer trust.
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy}>
          Change password
        </Button>
      </div>
    </form>
  );
}

import { type SubmitEvent, useState } from 'react';
import { accountPatchSchema } from '@/api/account.ts';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { useSubmission } from './use-submission.ts';

/** The own name, as others read it beside runs and releases. */
export default function NameForm({ name: stored }: { name: string }) {
  const [name, setName] = useState(stored);
  const { busy, fields, failure, done, submit } = useSubmission(accountPatchSchema);
  const save = (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    void submit({ name }, (body) => call(endpoints.patchAccount, { body }));
  };
  return (
    <form onSubmit={save} noValidate className="grid max-w-md gap-4">
      <TextField
        label="name"
        autoComplete="name"
        required
        error={fields.name}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not saved" live>
          {failure}
        </Notice>
      )}
      {done !== null && (
        <Notice kind="pass" word="Saved" live>
          Others see the new name from now on.
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy}>
          Save name
        </Button>
      </div>
    </form>
  );
}

import { useRef, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField, TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { Progress } from '@/components/ui/Progress.tsx';
import { paths } from '@/paths.ts';

interface Props {
  projectId: string;
  codes: readonly Pick<Code, 'id' | 'name'>[];
  /** The code chosen first, from the address. */
  chosen: string;
}

/** Puts a code before the reviewers as it stands now. */
export default function AskSignOff({ projectId, codes, chosen }: Props) {
  const [codeId, setCodeId] = useState(chosen);
  const [note, setNote] = useState('');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const leaving = useRef<AbortController | null>(null);

  const ask = async () => {
    const leave = new AbortController();
    leaving.current = leave;
    setBusy(true);
    setFailure(null);
    try {
      const input = { params: { id: projectId }, body: { codeId, note }, signal: leave.signal };
      const { signOff } = await call(endpoints.askSignOff, input);
      location.assign(paths.signOff(projectId, signOff.id));
    } catch (error) {
      setBusy(false);
      if (!leave.signal.aborted) setFailure((error as Error).message);
    }
  };

  return (
    <form
      className="grid gap-4 border border-rule bg-sheet px-4 py-4"
      aria-label="Ask for a sign-off"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void ask();
      }}
    >
      <h2>Ask for a sign-off</h2>
      <SelectField
        label="code"
        value={codeId}
        onChange={(event) => setCodeId(event.target.value)}
        choices={codes.map(({ id, name }) => ({ value: id, label: name }))}
      />
      <TextAreaField
        label="note to the reviewers"
        hint="at most 2000 characters; part of the snapshot"
        maxLength={2000}
        value={note}
        onChange={(event) => setNote(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not asked" live>
          {failure}
        </Notice>
      )}
      {busy && <Progress label="The evidence is being checked" value={null} left="Computing some shards again" />}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button kind="primary" type="submit" busy={busy}>
          Ask
        </Button>
        {busy && <Button onClick={() => leaving.current?.abort()}>Cancel</Button>}
        <p className="text-quiet text-tiny">
          Code, requirements and measurements are frozen as they are now; a few shards are computed again.
        </p>
      </div>
    </form>
  );
}

import type { BuiltCode } from '@workers/build/api.ts';
import { type SubmitEvent, useEffect, useRef, useState } from 'react';
import { ApiFailure } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';
import { keepCode } from './keep.ts';
import type { Keepable } from './use-build.ts';

interface Props {
  projectId: string;
  built: BuiltCode;
  request: Keepable;
}

/** Hands the spec and the fingerprint to the server, which builds the code itself and refuses it if they differ. */
export function KeepForm({ projectId, built, request }: Props) {
  const [name, setName] = useState('');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<{ message: string; name?: string } | null>(null);
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);

  const submit = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const controller = new AbortController();
    running.current = controller;
    setBusy(true);
    setFailure(null);
    const body = { ...request, fingerprint: built.fingerprint, ...(name.trim() && { name: name.trim() }) };
    try {
      location.assign(paths.code(projectId, await keepCode(projectId, body, controller.signal)));
    } catch (error) {
      if (controller.signal.aborted) return;
      setBusy(false);
      const message = error instanceof Error ? error.message : 'The code could not be kept.';
      setFailure({ message, name: error instanceof ApiFailure ? error.fields.name : undefined });
    }
  };

  return (
    <form onSubmit={submit} className="flex flex-wrap items-start gap-x-4 gap-y-3">
      <TextField
        className="w-72"
        label="name (optional)"
        hint="how the project calls it; else its design names it"
        maxLength={120}
        error={failure?.name}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not kept" live className="order-last w-full">
          {failure.message}
        </Notice>
      )}
      <Button kind="primary" type="submit" busy={busy} className="mt-4">
        {busy ? 'The server builds it too' : 'Keep in this project'}
      </Button>
    </form>
  );
}

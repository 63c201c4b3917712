import { useEffect, useRef, useState } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { choiceToSearch } from '@/components/codes/new/address.ts';
import { keepCode } from '@/components/codes/new/keep.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { Progress } from '@/components/ui/Progress.tsx';
import { paths } from '@/paths.ts';

type State = { kind: 'idle' } | { kind: 'busy' } | { kind: 'refused'; message: string };

/** Has the server build, verify and keep the candidate, and goes to its sheet. */
export function KeepCandidate({ projectId, row }: { projectId: string; row: CandidateRow }) {
  const [state, setState] = useState<State>({ kind: 'idle' });
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);
  const { design, checks, transforms } = row;

  const keep = async () => {
    const controller = new AbortController();
    running.current = controller;
    setState({ kind: 'busy' });
    try {
      const derivation = { kind: 'ldpc' as const, checks, ...(transforms.length > 0 && { transforms }) };
      location.assign(paths.code(projectId, await keepCode(projectId, { design, derivation }, controller.signal)));
    } catch (error) {
      if (controller.signal.aborted) return;
      setState({ kind: 'refused', message: error instanceof Error ? error.message : 'The code could not be kept.' });
    }
  };
  const stop = () => {
    running.current?.abort();
    setState({ kind: 'idle' });
  };

  if (state.kind === 'busy') {
    return (
      <div className="grid gap-2">
        <Progress label="Keeping the code" value={null} left="The server builds and verifies it." />
        <Button onClick={stop}>Stop waiting</Button>
        <p className="text-quiet text-tiny">
          What the server has begun it finishes: the code then appears among the codes.
        </p>
      </div>
    );
  }
  return (
    <div className="grid gap-2">
      {state.kind === 'refused' && (
        <Notice kind="fail" word="Not kept" live>
          {state.message}
        </Notice>
      )}
      <Button kind="primary" onClick={keep}>
        Keep in this project
      </Button>
      {transforms.length === 0 && (
        <ButtonLink
          kind="quiet"
          href={paths.newCode(projectId) + choiceToSearch({ ...design, params: asTyped(design.params), checks })}
        >
          Build here first
        </ButtonLink>
      )}
    </div>
  );
}

const asTyped = (params: Record<string, unknown>) =>
  Object.fromEntries(
    Object.entries(params).map(([name, value]) => [
      name,
      typeof value === 'object' ? JSON.stringify(value) : String(value),
    ]),
  );

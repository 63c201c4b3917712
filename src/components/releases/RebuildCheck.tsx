import { useRef, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { Progress } from '@/components/ui/Progress.tsx';

type Outcome = { identical: boolean; rebuilt: string } | { failure: string } | null;

/** Makes the bundle again and says whether it came out the same to the byte. */
export default function RebuildCheck({ releaseId }: { releaseId: string }) {
  const [busy, setBusy] = useState(false);
  const [outcome, setOutcome] = useState<Outcome>(null);
  const leaving = useRef<AbortController | null>(null);
  const rebuild = async () => {
    const leave = new AbortController();
    leaving.current = leave;
    setBusy(true);
    setOutcome(null);
    try {
      const input = { params: { id: releaseId }, body: {}, signal: leave.signal };
      setOutcome(await call(endpoints.rebuildRelease, input));
    } catch (error) {
      if (!leave.signal.aborted) setOutcome({ failure: (error as Error).message });
    } finally {
      setBusy(false);
    }
  };
  return (
    <div className="grid gap-2" data-screen-only>
      <div className="flex flex-wrap gap-2">
        <Button size="small" busy={busy} onClick={rebuild}>
          Rebuild and compare
        </Button>
        {busy && (
          <Button size="small" onClick={() => leaving.current?.abort()}>
            Cancel
          </Button>
        )}
      </div>
      {busy && <Progress label="The bundle is being made again" value={null} />}
      {outcome && <OutcomeNotice outcome={outcome} />}
    </div>
  );
}

function OutcomeNotice({ outcome }: { outcome: NonNullable<Outcome> }) {
  if ('failure' in outcome) {
    return (
      <Notice kind="fail" word="Not rebuilt" live>
        {outcome.failure}
      </Notice>
    );
  }
  if (outcome.identical) {
    return (
      <Notice kind="pass" word="Identical" live>
        Made again from the stored matrix, the bundle has the same SHA-256.
      </Notice>
    );
  }
  return (
    <Notice kind="caution" word="Different" live>
      This version of the program makes other bytes, with SHA-256 {outcome.rebuilt}. The stored release is as it was.
    </Notice>
  );
}

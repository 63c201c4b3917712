import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { NewDecision } from '@/api/sign-offs.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

/** The decision on a sign-off: once, with a reason. */
export default function DecideSignOff({ signOffId }: { signOffId: string }) {
  const [reason, setReason] = useState('');
  const [busy, setBusy] = useState<NewDecision['outcome'] | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const decide = async (outcome: NewDecision['outcome']) => {
    setBusy(outcome);
    setFailure(null);
    try {
      await call(endpoints.decideSignOff, { params: { id: signOffId }, body: { outcome, reason } });
      location.reload();
    } catch (error) {
      setBusy(null);
      setFailure((error as Error).message);
    }
  };
  const isMissing = reason.trim().length < 3;
  return (
    <section className="grid gap-4 border border-ink bg-sheet px-4 py-4" aria-label="Decision" data-screen-only>
      <h2>Decide</h2>
      <TextAreaField
        label="reason"
        hint="3 to 2000 characters; on record for good"
        maxLength={2000}
        required
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not decided" live>
          {failure}
        </Notice>
      )}
      <div className="flex flex-wrap gap-2">
        <Button
          kind="primary"
          busy={busy === 'approved'}
          disabled={isMissing || busy !== null}
          onClick={() => decide('approved')}
        >
          Approve
        </Button>
        <Button busy={busy === 'returned'} disabled={isMissing || busy !== null} onClick={() => decide('returned')}>
          Return
        </Button>
      </div>
    </section>
  );
}

import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { NewEnding } from '@/api/releases.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';
import { SelectField, TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

interface Props {
  release: { id: string; number: number };
  /** Later releases that hold, newest first. */
  successors: readonly { id: string; number: number }[];
  maySupersede: boolean;
}

/** Says that a release is superseded or withdrawn, and why; it is not undone. */
export default function EndRelease({ release, successors, maySupersede }: Props) {
  const [kind, setKind] = useState<NewEnding['kind'] | null>(null);
  const canSupersede = maySupersede && successors.length > 0;
  return (
    <div className="flex flex-wrap gap-2">
      {canSupersede && <Button onClick={() => setKind('superseded')}>Supersede</Button>}
      <Button onClick={() => setKind('withdrawn')}>Withdraw</Button>
      <EndingDialog
        key={kind}
        kind={kind ?? 'withdrawn'}
        open={kind !== null}
        release={release}
        successors={successors}
        onClose={() => setKind(null)}
      />
    </div>
  );
}

interface DialogProps extends Pick<Props, 'release' | 'successors'> {
  kind: NewEnding['kind'];
  open: boolean;
  onClose: () => void;
}

function EndingDialog({ kind, open, release, successors, onClose }: DialogProps) {
  const [reason, setReason] = useState('');
  const [successorId, setSuccessorId] = useState(successors[0]?.id ?? '');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const supersedes = kind === 'superseded';

  const end = async () => {
    setBusy(true);
    setFailure(null);
    try {
      const body: NewEnding = supersedes ? { kind: 'superseded', reason, successorId } : { kind: 'withdrawn', reason };
      await call(endpoints.endRelease, { params: { id: release.id }, body });
      location.reload();
    } catch (error) {
      setBusy(false);
      setFailure(error instanceof Error ? error.message : 'It could not be recorded.');
    }
  };

  return (
    <Dialog
      title={supersedes ? `Supersede release ${release.number}?` : `Withdraw release ${release.number}?`}
      open={open}
      onClose={onClose}
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} disabled={reason.trim().length < 3} onClick={end}>
            {supersedes ? 'Supersede' : 'Withdraw'}
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <p>
          {supersedes
            ? 'Its files stay as they are; whoever opens it is led to the release that takes its place.'
            : 'Its files stay as they are, marked as not to be used. This is not undone.'}
        </p>
        {supersedes && (
          <SelectField
            label="by"
            value={successorId}
            onChange={(event) => setSuccessorId(event.target.value)}
            choices={successors.map(({ id, number }) => ({ value: id, label: `Release ${number}` }))}
          />
        )}
        <TextAreaField
          label="reason"
          hint="3 to 2000 characters; shown with the release for good"
          maxLength={2000}
          required
          value={reason}
          onChange={(event) => setReason(event.target.value)}
        />
        {failure && (
          <Notice kind="fail" word="Not recorded" live>
            {failure}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}

import { useState } from 'react';
import type { Token } from '@/api/tokens.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

interface Props {
  /** The token asked about; null while nothing is asked. */
  token: Token | null;
  onClose: () => void;
  onRevoke: (token: Token) => Promise<void>;
}

export function RevokeDialog({ token, onClose, onRevoke }: Props) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const close = () => {
    setFailure(null);
    onClose();
  };
  const revoke = async () => {
    if (!token) return;
    setBusy(true);
    setFailure(null);
    try {
      await onRevoke(token);
    } catch (error) {
      setFailure(error instanceof Error ? error.message : String(error));
    }
    setBusy(false);
  };
  return (
    <Dialog
      title="Revoke this token?"
      open={token !== null}
      onClose={close}
      actions={
        <>
          <Button kind="quiet" onClick={close}>
            Keep it
          </Button>
          <Button kind="primary" busy={busy} onClick={revoke}>
            Revoke
          </Button>
        </>
      }
    >
      <p>Scripts that use “{token?.name}” are refused from the next request on. This cannot be taken back.</p>
      {failure && (
        <Notice kind="fail" word="Not revoked" live className="mt-3">
          {failure}
        </Notice>
      )}
    </Dialog>
  );
}

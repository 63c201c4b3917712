import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Measurement } from '@/api/measurements.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

interface Props {
  /** null while none is to be removed. */
  measured: Measurement | null;
  onClose: () => void;
  onRemoved: () => void;
}

/** Removes measured data after asking. */
export function RemoveMeasured({ measured, onClose, onRemoved }: Props) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const remove = async () => {
    if (!measured) return;
    setBusy(true);
    setFailure(null);
    try {
      await call(endpoints.deleteMeasurement, { params: { id: measured.id } });
      onRemoved();
    } catch (error) {
      setFailure((error as Error).message);
    }
    setBusy(false);
  };
  return (
    <Dialog
      title="Remove these measured data?"
      open={measured !== null}
      onClose={onClose}
      actions={
        <>
          <Button onClick={onClose}>Keep them</Button>
          <Button kind="primary" busy={busy} onClick={remove}>
            Remove
          </Button>
        </>
      }
    >
      <p>“{measured?.name}” leaves the project. The file it came from is not touched.</p>
      {failure && (
        <Notice kind="fail" word="Not removed" live className="mt-3">
          {failure}
        </Notice>
      )}
    </Dialog>
  );
}

import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';

/** Removes a code after asking; the server refuses while a run uses it. */
export default function RemoveCode({ projectId, codeId, name }: { projectId: string; codeId: string; name: string }) {
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);

  const remove = async () => {
    setBusy(true);
    setFailure(null);
    try {
      await call(endpoints.deleteCode, { params: { id: codeId } });
      location.assign(paths.codes(projectId));
    } catch (error) {
      setBusy(false);
      setFailure(error instanceof Error ? error.message : 'The code could not be removed.');
    }
  };

  return (
    <>
      <Button size="small" onClick={() => setOpen(true)}>
        Remove code
      </Button>
      <Dialog
        title="Remove this code?"
        open={open}
        onClose={() => setOpen(false)}
        actions={
          <>
            <Button onClick={() => setOpen(false)}>Keep it</Button>
            <Button kind="primary" busy={busy} onClick={remove}>
              Remove
            </Button>
          </>
        }
      >
        <p>“{name}” leaves the project. A code that a run uses is not removed.</p>
        {failure && (
          <Notice kind="fail" word="Not removed" live className="mt-3">
            {failure}
          </Notice>
        )}
      </Dialog>
    </>
  );
}

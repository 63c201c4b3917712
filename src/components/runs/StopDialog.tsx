import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';

interface Props {
  open: boolean;
  onClose: () => void;
  onStop: () => void;
}

export function StopDialog({ open, onClose, onStop }: Props) {
  return (
    <Dialog
      title="Stop this run for good?"
      open={open}
      onClose={onClose}
      actions={
        <>
          <Button kind="quiet" onClick={onClose}>
            Keep it
          </Button>
          <Button kind="primary" onClick={onStop}>
            Stop the run
          </Button>
        </>
      }
    >
      <p>
        Its figures stay and can be compared and quoted, and no more frames are added. To go on later, pause it instead.
      </p>
    </Dialog>
  );
}

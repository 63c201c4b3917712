import { type ReactNode, useEffect, useId, useRef } from 'react';

interface Props {
  title: string;
  open: boolean;
  onClose: () => void;
  children: ReactNode;
  /** Buttons, the safe one first. */
  actions: ReactNode;
}

/** A modal question on the browser's own dialog: focus is kept inside, Escape closes, focus returns. */
export function Dialog({ title, open, onClose, children, actions }: Props) {
  const ref = useRef<HTMLDialogElement>(null);
  const heading = useId();
  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);
  return (
    <dialog
      ref={ref}
      aria-labelledby={heading}
      onClose={onClose}
      className="m-auto w-[min(32rem,calc(100vw-2rem))] border border-ink bg-sheet p-5 text-ink backdrop:bg-[#0b1820]/60"
    >
      <h2 id={heading}>{title}</h2>
      <div className="mt-2">{children}</div>
      <div className="mt-5 flex flex-wrap justify-end gap-2">{actions}</div>
    </dialog>
  );
}

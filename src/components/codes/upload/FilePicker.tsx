import { type DragEvent, useId, useState } from 'react';
import { classes } from '@/components/ui/classes.ts';

interface Props {
  chosen: string | null;
  disabled?: boolean;
  onChoose: (file: File) => void;
}

/** A file by button, by keyboard, or dropped on the frame. */
export function FilePicker({ chosen, disabled, onChoose }: Props) {
  const id = useId();
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const file = event.dataTransfer.files[0];
    if (file && !disabled) onChoose(file);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is a second way; the input inside is the first
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={classes('border border-ink border-dashed px-4 py-5', over ? 'bg-tint' : 'bg-sheet')}
    >
      <label htmlFor={id} className="font-semibold">
        Matrix or block list
      </label>
      <input
        id={id}
        type="file"
        disabled={disabled}
        aria-describedby={`${id}-note`}
        className="mt-2 block w-full min-w-0 file:mr-3 file:cursor-pointer file:border file:border-act file:border-solid file:bg-transparent file:px-3 file:py-1.5 file:font-semibold file:text-act"
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) onChoose(file);
        }}
      />
      <p id={`${id}-note`} className="mt-2 text-quiet text-tiny">
        {chosen ? `${chosen}. ` : ''}Up to 200 MB: alist, Matrix Market, CSV, JSON, .npz, .npy, .mat, C header, shift
        table, block list. Or drop it here.
      </p>
    </div>
  );
}

import { useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';

interface Props {
  label: string;
  text: () => string;
}

/** Puts text on the clipboard and says whether that worked. */
export function CopyButton({ label, text }: Props) {
  const [outcome, setOutcome] = useState('');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text());
      setOutcome('Copied.');
    } catch {
      setOutcome('The browser did not allow copying; download the file instead.');
    }
  };
  return (
    <span className="inline-flex flex-wrap items-center gap-2">
      <Button size="small" onClick={copy}>
        {label}
      </Button>
      <span role="status" className="text-quiet text-tiny">
        {outcome}
      </span>
    </span>
  );
}

import { useId } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';

const CHOICES: { kind: RateKind; label: string; title: string }[] = [
  { kind: 'fer', label: 'FER', title: 'Frame error rate: frames decoded to another word than the one sent' },
  { kind: 'ber', label: 'BER', title: 'Bit error rate: wrong bits over all n positions after decoding' },
];

interface Props {
  kind: RateKind;
  onKind: (kind: RateKind) => void;
}

/** Frames or bits: two cells of a ruled strip. */
export function RateSwitch({ kind, onKind }: Props) {
  const name = useId();
  return (
    <fieldset className="flex border border-rule" data-screen-only>
      <legend className="sr-only">Error rate shown</legend>
      {CHOICES.map((choice) => (
        <label
          key={choice.kind}
          title={choice.title}
          className="cursor-pointer border-rule border-l bg-sheet px-3 py-1 font-semibold text-quiet text-tiny first-of-type:border-l-0 has-checked:bg-tint has-checked:text-ink has-focus-visible:outline-2 has-focus-visible:outline-act"
        >
          <input
            type="radio"
            className="sr-only"
            name={name}
            value={choice.kind}
            checked={choice.kind === kind}
            onChange={() => onKind(choice.kind)}
          />
          {choice.label}
        </label>
      ))}
    </fieldset>
  );
}

import { decoderName } from '@/client/curves/decoder-text.ts';
import { NumberField } from '@/components/ui/fields.tsx';
import type { DecoderDraft, FieldErrors, OfferedDecoder } from './run-draft.ts';

interface Props {
  kind: OfferedDecoder;
  draft: DecoderDraft;
  errors: FieldErrors;
  onChange: (change: Partial<DecoderDraft>) => void;
}

const ABOUT: Record<OfferedDecoder, string> = {
  'gallager-b': 'Hard decision; a check’s message is overruled when enough others disagree.',
  'bit-flipping': 'Hard decision; every bit with enough failing checks flips at once.',
  'majority-logic': 'Hard decision; one vote of the checks on each bit, one iteration.',
  'sum-product': 'Soft, floating point; flooding schedule.',
};

const DEFAULT_THRESHOLD: Partial<Record<OfferedDecoder, string>> = {
  'gallager-b': 'empty: ⌈d/2⌉ of a bit’s d checks',
  'bit-flipping': 'empty: ⌊d/2⌋ + 1 of a bit’s d checks',
};

/** One decoder: whether it is measured, and with which parameters. */
export function DecoderFields({ kind, draft, errors, onChange }: Props) {
  const threshold = DEFAULT_THRESHOLD[kind];
  return (
    <div className="border-hair border-b py-2.5">
      <label className="flex cursor-pointer items-baseline gap-2.5">
        <input
          type="checkbox"
          className="accent-act"
          checked={draft.isChosen}
          onChange={(event) => onChange({ isChosen: event.target.checked })}
        />
        <span>
          <span className="inline-block font-semibold first-letter:uppercase">{decoderName({ kind })}</span>
          <span className="block text-quiet text-tiny">{ABOUT[kind]}</span>
        </span>
      </label>
      {draft.isChosen && kind !== 'majority-logic' && (
        <div className="mt-2 grid gap-4 pl-6 sm:grid-cols-2">
          <NumberField
            label="Iterations, at most"
            value={draft.iterations}
            error={errors[`${kind}.iterations`]}
            hint="1 to 1000"
            onChange={(event) => onChange({ iterations: event.target.value })}
          />
          {threshold && (
            <NumberField
              label="Threshold, checks"
              value={draft.threshold}
              error={errors[`${kind}.threshold`]}
              hint={threshold}
              onChange={(event) => onChange({ threshold: event.target.value })}
            />
          )}
          {kind === 'sum-product' && (
            <NumberField
              label="Set for p"
              value={draft.designP}
              error={errors[`${kind}.designP`]}
              hint="empty: the channel’s own p at each point"
              onChange={(event) => onChange({ designP: event.target.value })}
            />
          )}
        </div>
      )}
    </div>
  );
}

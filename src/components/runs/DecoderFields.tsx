import type { Code } from '@/api/codes.ts';
import { decoderName } from '@/client/curves/decoder-text.ts';
import { NumberField } from '@/components/ui/fields.tsx';
import { decoderCard } from '@/core/decoders/catalogue.ts';
import { Calibrate } from './Calibrate.tsx';
import { takenOver } from './calibrated.ts';
import { decoderCost } from './decoder-cost.ts';
import { MinSumFields } from './MinSumFields.tsx';
import type { FieldErrors } from './run-accepted.ts';
import { type DecoderDraft, decoderOf, type OfferedDecoder } from './run-draft.ts';

interface Props {
  kind: OfferedDecoder;
  draft: DecoderDraft;
  errors: FieldErrors;
  /** Those chosen for the run: on one of them settings are tried. */
  codes: readonly Code[];
  /** At which p settings are tried unless another is typed. */
  trialP: string;
  /** Numbers of errors are measured, at which no decoder may know p. */
  areStrata: boolean;
  onChange: (change: Partial<DecoderDraft>) => void;
}

const DEFAULT_THRESHOLD: Partial<Record<OfferedDecoder, string>> = {
  'gallager-b': 'empty: ⌈d/2⌉ of a bit’s d checks',
  'bit-flipping': 'empty: ⌊d/2⌋ + 1 of a bit’s d checks',
};

/** One decoder: whether it is measured, and with which parameters. */
export function DecoderFields({ kind, draft, errors, codes, trialP, areStrata, onChange }: Props) {
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
          <span className="block text-quiet text-tiny">{decoderCard(kind).choose}</span>
          <span className="block text-quiet text-tiny">{decoderCost(kind, codes)}</span>
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
              hint={areStrata ? 'needed for strata, whose failures must not depend on p' : 'empty: the channel’s own p'}
              onChange={(event) => onChange({ designP: event.target.value })}
            />
          )}
          {kind === 'min-sum' && <MinSumFields draft={draft} errors={errors} onChange={onChange} />}
        </div>
      )}
      {draft.isChosen && (kind === 'min-sum' || kind === 'bit-flipping') && (
        <Calibrate
          codes={codes}
          decoder={decoderOf(kind, draft)}
          p={trialP}
          onTake={(decoder) => onChange(takenOver(decoder))}
        />
      )}
    </div>
  );
}

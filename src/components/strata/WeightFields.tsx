import { NumberField } from '@/components/ui/fields.tsx';
import { counted } from '@/components/ui/numbers.ts';
import type { FieldErrors } from '../runs/run-accepted.ts';
import type { RunDraft } from '../runs/run-draft.ts';

interface Props {
  draft: RunDraft;
  errors: FieldErrors;
  weights: readonly number[];
  onChange: (change: Partial<RunDraft>) => void;
}

/** The numbers of errors to measure at, and for how many frames each. */
export function WeightFields({ draft, errors, weights, onChange }: Props) {
  return (
    <div className="grid gap-3">
      <div className="grid gap-4 sm:grid-cols-2">
        <NumberField
          label="From weight"
          value={draft.weightFrom}
          error={errors.weightFrom}
          hint="errors a frame; weights that are proved or enumerated need no frames"
          onChange={(event) => onChange({ weightFrom: event.target.value })}
        />
        <NumberField
          label="To weight"
          value={draft.weightTo}
          error={errors.weightTo}
          hint="heavier frames count as failed in the upper limit"
          onChange={(event) => onChange({ weightTo: event.target.value })}
        />
        <NumberField
          label="Frames a weight"
          value={draft.framesPerWeight}
          error={errors.framesPerWeight}
          hint="a set number, so that Clopper–Pearson is exact"
          onChange={(event) => onChange({ framesPerWeight: event.target.value })}
        />
        <NumberField
          label="Target p"
          value={draft.targetP}
          error={errors.targetP}
          hint="where the curve is read first; it gives every p"
          onChange={(event) => onChange({ targetP: event.target.value })}
        />
      </div>
      <p className="text-quiet text-tiny">
        {weights.length > 0 && `${counted(weights.length, 'weight')}. `}
        Each point decodes uniformly random patterns of one number of errors. One run gives the frame and bit error rate
        at every p of the binary symmetric channel, with limits that hold at all of them at once.
      </p>
    </div>
  );
}

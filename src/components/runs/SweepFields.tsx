import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { NumberField, TextAreaField } from '@/components/ui/fields.tsx';
import { parameterText } from '../charts/rate-text.ts';
import type { FieldErrors } from './run-accepted.ts';
import type { RunDraft } from './run-draft.ts';

interface Props {
  draft: RunDraft;
  errors: FieldErrors;
  sweep: readonly number[];
  onChange: (change: Partial<RunDraft>) => void;
}

/** The crossover probabilities to measure at: evenly spaced on the logarithmic axis, or listed. */
export function SweepFields({ draft, errors, sweep, onChange }: Props) {
  return (
    <div className="grid gap-3">
      <ChoiceGroup
        legend="Crossover probabilities"
        value={draft.sweep}
        onChange={(value) => onChange({ sweep: value, list: draft.list || sweep.join(' ') })}
        choices={[
          { value: 'spaced', label: 'Spaced', note: 'evenly on the logarithmic axis' },
          { value: 'listed', label: 'Listed', note: 'typed one by one' },
        ]}
      />
      {draft.sweep === 'spaced' ? (
        <div className="grid gap-4 sm:grid-cols-3">
          <NumberField
            label="From p"
            value={draft.from}
            error={errors.from}
            hint="above 0, at most 0.5"
            onChange={(event) => onChange({ from: event.target.value })}
          />
          <NumberField
            label="To p"
            value={draft.to}
            error={errors.to}
            hint="above 0, at most 0.5"
            onChange={(event) => onChange({ to: event.target.value })}
          />
          <NumberField
            label="Points"
            value={draft.count}
            error={errors.count}
            hint="1 to 200"
            onChange={(event) => onChange({ count: event.target.value })}
          />
        </div>
      ) : (
        <TextAreaField
          label="List of p"
          value={draft.list}
          error={errors.list}
          hint="parted by spaces, commas or line breaks; above 0, at most 0.5"
          onChange={(event) => onChange({ list: event.target.value })}
        />
      )}
      {sweep.length > 0 && (
        <p className="text-tiny">
          <span className="text-quiet">Measured at p = </span>
          <span className="font-mono [overflow-wrap:anywhere]">{sweep.map(parameterText).join(', ')}</span>
        </p>
      )}
    </div>
  );
}

import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { NumberField } from '@/components/ui/fields.tsx';
import type { FieldErrors } from './run-accepted.ts';
import type { RunDraft } from './run-draft.ts';

interface Props {
  draft: RunDraft;
  errors: FieldErrors;
  onChange: (change: Partial<RunDraft>) => void;
}

/** A curve whose points the planner places. */
export function CurveGoalFields({ draft, errors, onChange }: Props) {
  return (
    <div className="grid gap-3">
      <div className="grid gap-4 sm:grid-cols-3">
        <NumberField
          label="From p"
          value={draft.from}
          error={errors.from}
          hint="where errors are plentiful"
          onChange={(event) => onChange({ from: event.target.value })}
        />
        <NumberField
          label="Down to p"
          value={draft.to}
          error={errors.to}
          hint="above 0, below the first"
          onChange={(event) => onChange({ to: event.target.value })}
        />
        <NumberField
          label="Points of a curve, at most"
          value={draft.mostPoints}
          error={errors.mostPoints}
          hint="2 to 200"
          onChange={(event) => onChange({ mostPoints: event.target.value })}
        />
      </div>
      <p className="text-quiet text-tiny">
        Points are added as results come in: down the waterfall in steps of the error rate, then where the interval is
        widest. A curve ends where a point would reach its frames before its errors.
      </p>
    </div>
  );
}

/** A rate that is to be shown to keep a limit at one p. */
export function LimitGoalFields({ draft, errors, onChange }: Props) {
  return (
    <div className="grid gap-3">
      <ChoiceGroup
        legend="Rate"
        value={draft.limitRate}
        onChange={(limitRate) => onChange({ limitRate })}
        choices={[
          { value: 'fer', label: 'FER', note: 'frames decoded wrongly' },
          { value: 'uber', label: 'UBER', note: 'FER over the information bits of a frame (JEDEC JESD218)' },
        ]}
      />
      <div className="grid gap-4 sm:grid-cols-3">
        <NumberField
          label="At p"
          value={draft.targetP}
          error={errors.targetP}
          hint="above 0, at most 0.5"
          onChange={(event) => onChange({ targetP: event.target.value })}
        />
        <NumberField
          label="Limit"
          value={draft.limitTarget}
          error={errors.limitTarget}
          hint="1e-15 is understood"
          onChange={(event) => onChange({ limitTarget: event.target.value })}
        />
        <NumberField
          label="Confidence"
          value={draft.limitLevel}
          error={errors.limitLevel}
          hint="0.5 to 0.9999"
          onChange={(event) => onChange({ limitLevel: event.target.value })}
        />
      </div>
      <p className="text-quiet text-tiny">
        Small numbers of errors are proved or tried whole, the others sampled where they matter most at that p. Each
        stage has its own part of the chance to be wrong, so that the verdict holds at the stated confidence.
      </p>
    </div>
  );
}

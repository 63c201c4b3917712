import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import type { FieldErrors } from './run-accepted.ts';
import { type DecoderDraft, MIN_SUM_SCALES } from './run-draft.ts';

interface Props {
  draft: DecoderDraft;
  errors: FieldErrors;
  onChange: (change: Partial<DecoderDraft>) => void;
}

const SCALE_CHOICES = [
  { value: '', label: 'by the column weight' },
  ...MIN_SUM_SCALES.map((scale) => ({ value: scale, label: scale === 'offset-1' ? 'less 1' : `× ${scale}` })),
];

/** What min-sum leaves open beside its iterations. */
export function MinSumFields({ draft, errors, onChange }: Props) {
  return (
    <>
      <SelectField
        label="Schedule"
        value={draft.schedule}
        choices={[
          { value: 'layered', label: 'layered, rows in order' },
          { value: 'flooding', label: 'flooding' },
        ]}
        onChange={(event) => onChange({ schedule: event.target.value as DecoderDraft['schedule'] })}
      />
      <SelectField
        label="Scale of a check’s message"
        value={draft.scale}
        choices={SCALE_CHOICES}
        onChange={(event) => onChange({ scale: event.target.value as DecoderDraft['scale'] })}
      />
      <NumberField
        label="Channel value"
        value={draft.c}
        error={errors['min-sum.c']}
        hint="empty: 16; channel and messages together stay within 127"
        onChange={(event) => onChange({ c: event.target.value })}
      />
      <NumberField
        label="Largest message"
        value={draft.rMax}
        error={errors['min-sum.rMax']}
        hint="empty: the largest that cannot saturate"
        onChange={(event) => onChange({ rMax: event.target.value })}
      />
    </>
  );
}

import { NumberField, SelectField, TextAreaField, TextField } from '@/components/ui/fields.tsx';
import type { ParamInfo } from '@/core/designs/family.ts';
import type { Refusal } from '../refusal.ts';

interface Props {
  infos: readonly ParamInfo[];
  values: Record<string, string>;
  refusal: Refusal | null;
  onChange: (name: string, value: string) => void;
}

/** One field a parameter, whatever family declares it. */
export function ParamFields({ infos, values, refusal, onChange }: Props) {
  return (
    <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
      {infos.map((info) => (
        <ParamField
          key={info.name}
          info={info}
          value={values[info.name] ?? ''}
          error={errorFor(info, refusal)}
          onChange={(value) => onChange(info.name, value)}
        />
      ))}
    </div>
  );
}

function errorFor({ name }: ParamInfo, refusal: Refusal | null): string | undefined {
  if (refusal?.kind === 'param' && refusal.param === name) return `accepted is ${refusal.accepted}`;
  return refusal?.kind === 'infeasible' && refusal.param === name ? 'no design has this value, see below' : undefined;
}

interface FieldProps {
  info: ParamInfo;
  value: string;
  error: string | undefined;
  onChange: (value: string) => void;
}

function ParamField({ info, value, error, onChange }: FieldProps) {
  const common = {
    label: info.optional ? `${info.label} (optional)` : info.label,
    hint: info.accepted,
    error,
    name: info.name,
    value,
    onChange: (event: { target: { value: string } }) => onChange(event.target.value),
  };
  if (info.kind === 'integer') return <NumberField {...common} inputMode="numeric" />;
  if (info.kind === 'choice') {
    const choices = (info.choices ?? []).map((choice) => ({ value: choice, label: choice }));
    return <SelectField {...common} choices={info.optional ? [{ value: '', label: 'any' }, ...choices] : choices} />;
  }
  if (info.kind === 'spec') return <TextAreaField {...common} spellCheck={false} className="sm:col-span-2" />;
  return <TextField {...common} spellCheck={false} autoComplete="off" />;
}

import { type SubmitEvent, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Requirements } from '@/api/projects.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { NumberField, SelectField, TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';
import { ChannelFields } from './ChannelFields.tsx';
import { DecoderFields } from './DecoderFields.tsx';
import { type Draft, draftFrom, judge, type NumberKey } from './draft.ts';

interface Props {
  projectId: string;
  stored: Requirements | null;
}

const PAYLOADS = [
  { label: '512 B', bits: 4096 },
  { label: '4 KiB', bits: 32_768 },
];

/** States what the project needs. Nothing is sent until the schema accepts it. */
export default function RequirementsForm({ projectId, stored }: Props) {
  const [draft, setDraft] = useState<Draft>(() => draftFrom(stored));
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const change = (part: Partial<Draft>) => setDraft((before) => ({ ...before, ...part }));

  const submit = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    const judged = judge(draft);
    setFields(judged.ok ? {} : judged.fields);
    setFailure(null);
    if (!judged.ok) {
      requestAnimationFrame(() => form.querySelector<HTMLElement>('[aria-invalid]')?.focus());
      return;
    }
    setBusy(true);
    try {
      await call(endpoints.putRequirements, { params: { id: projectId }, body: judged.requirements });
      location.assign(paths.requirements(projectId));
    } catch (error) {
      setBusy(false);
      setFailure(error instanceof Error ? error.message : 'The requirements could not be saved.');
      if (error instanceof ApiFailure) setFields({ ...error.fields });
    }
  };

  const number = (key: NumberKey, label: string, hint?: string) => (
    <NumberField
      label={label}
      hint={hint}
      error={fields[key]}
      value={draft.numbers[key]}
      onChange={(event) => change({ numbers: { ...draft.numbers, [key]: event.target.value } })}
    />
  );

  return (
    <form onSubmit={submit} noValidate className="grid max-w-4xl gap-7">
      <TextAreaField
        label="In words"
        hint="Who needs the code, for what link or medium."
        error={fields.summary}
        value={draft.summary}
        onChange={(event) => change({ summary: event.target.value })}
      />
      <Group legend="Targets, at least one">
        {number('targetBer', 'bit error rate, greatest', 'such as 1e-9')}
        {number('targetFer', 'frame error rate, greatest')}
        {number('targetUber', 'UBER, greatest', 'frame error rate by information bits')}
      </Group>
      <ChannelFields draft={draft} fields={fields} onChange={change} />
      <Group legend="Size">
        <div className="grid content-start gap-1.5">
          {number('payloadBits', 'payload, bits')}
          <div className="flex gap-2">
            {PAYLOADS.map(({ label, bits }) => (
              <Button
                key={label}
                size="small"
                kind="quiet"
                onClick={() => change({ numbers: { ...draft.numbers, payloadBits: String(bits) } })}
              >
                {label}
              </Button>
            ))}
          </div>
        </div>
        {number('parityBits', 'parity budget, bits')}
        {number('rateMin', 'rate, least')}
        {number('lengthMin', 'length n, least')}
        {number('lengthMax', 'length n, greatest')}
      </Group>
      <Group legend="Structure and decoder">
        <SelectField
          label="structure"
          value={draft.structure}
          onChange={(event) => change({ structure: event.target.value })}
          choices={[
            { value: '', label: 'not stated' },
            { value: 'any', label: 'any' },
            { value: 'cyclic', label: 'cyclic' },
            { value: 'quasi-cyclic', label: 'quasi-cyclic' },
          ]}
        />
        {number('columnWeightMax', 'column weight, greatest')}
        <DecoderFields draft={draft} fields={fields} onChange={change} />
      </Group>
      {failure && (
        <Notice kind="fail" word="Not saved" live>
          {failure}
        </Notice>
      )}
      {!failure && Object.keys(fields).length > 0 && (
        <Notice kind="fail" word="Not saved" live>
          Some fields are not accepted; each says what would be.
        </Notice>
      )}
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" type="submit" busy={busy}>
          Save requirements
        </Button>
        <ButtonLink href={paths.requirements(projectId)}>Leave as they were</ButtonLink>
      </div>
    </form>
  );
}

export function Group({ legend, children }: { legend: string; children: React.ReactNode }) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 font-semibold">{legend}</legend>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">{children}</div>
    </fieldset>
  );
}

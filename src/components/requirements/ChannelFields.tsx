import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import type { Channel } from '@/core/channels/channel.ts';
import { CHANNEL_NAMES } from './channel-text.ts';
import { CHANNEL_PARAMS, type Draft } from './draft.ts';

interface Props {
  draft: Draft;
  fields: Record<string, string>;
  onChange: (part: Partial<Draft>) => void;
}

const KINDS = Object.keys(CHANNEL_PARAMS) as Channel['kind'][];

/** The channel and its raw error rate. */
export function ChannelFields({ draft, fields, onChange }: Props) {
  const params = draft.channelKind === '' ? [] : (CHANNEL_PARAMS[draft.channelKind] ?? []);
  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 font-semibold">Channel</legend>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
        <SelectField
          label="channel"
          value={draft.channelKind}
          error={fields['channel.kind']}
          onChange={(event) => onChange({ channelKind: event.target.value as Draft['channelKind'] })}
          choices={[
            { value: '', label: 'not stated' },
            ...KINDS.map((kind) => ({ value: kind, label: CHANNEL_NAMES[kind] })),
          ]}
        />
        {params.map(({ name, label, accepted }) => (
          <NumberField
            key={name}
            label={label}
            hint={accepted}
            error={fields[`channel.${name}`]}
            value={draft.channel[name] ?? ''}
            onChange={(event) => onChange({ channel: { ...draft.channel, [name]: event.target.value } })}
          />
        ))}
      </div>
    </fieldset>
  );
}

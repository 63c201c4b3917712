import { decoderName } from '@/client/curves/decoder-text.ts';
import { NumberField, TextField } from '@/components/ui/fields.tsx';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { ChannelFields } from '../requirements/ChannelFields.tsx';
import { Checks } from './Checks.tsx';
import { decodersFor, type VectorDraft } from './vector-draft.ts';

interface Props {
  draft: VectorDraft;
  fields: Record<string, string>;
  onChange: (draft: VectorDraft) => void;
}

/** What test vectors are made of: channel, decoders, seed and number of frames. */
export function VectorFields({ draft, fields, onChange }: Props) {
  const set = (part: Partial<VectorDraft>) => onChange({ ...draft, ...part });
  return (
    <div className="grid gap-5">
      <ChannelFields
        draft={draft.channel}
        fields={fields}
        onChange={(part) => set({ channel: { ...draft.channel, ...part } })}
      />
      <Checks
        legend="Decoders"
        error={fields.decoders}
        choices={decodersFor(draft.channel.channelKind).map((kind) => ({
          id: kind,
          title: decoderName({ kind } as DecoderSpec),
        }))}
        chosen={draft.decoders}
        onChange={(decoders) => set({ decoders })}
      />
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-3">
        <NumberField
          label="iterations, at most"
          hint="1 to 1000; each decoder's own when empty"
          error={fields.iterations}
          value={draft.iterations}
          onChange={(event) => set({ iterations: event.target.value })}
        />
        <NumberField
          label="frames"
          hint="1 to 100 000"
          error={fields.count}
          value={draft.count}
          onChange={(event) => set({ count: event.target.value })}
        />
        <TextField
          label="seed"
          hint="the same seed gives the same vectors"
          error={fields.seed}
          value={draft.seed}
          onChange={(event) => set({ seed: event.target.value })}
        />
      </div>
    </div>
  );
}

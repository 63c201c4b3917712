import { decoderName } from '@/client/curves/decoder-text.ts';
import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { type Draft, ITERATIVE } from './draft.ts';

interface Props {
  draft: Draft;
  fields: Record<string, string>;
  onChange: (part: Partial<Draft>) => void;
}

const KINDS: DecoderSpec['kind'][] = ['majority-logic', ...ITERATIVE, 'peeling', 'elimination'];

/** The decoder the receiver can afford, and its iteration budget. */
export function DecoderFields({ draft, fields, onChange }: Props) {
  const kinds =
    draft.keptDecoder && !KINDS.includes(draft.keptDecoder.kind) ? [...KINDS, draft.keptDecoder.kind] : KINDS;
  const kept = draft.keptDecoder?.kind === draft.decoderKind;
  return (
    <>
      <SelectField
        label="decoder"
        value={draft.decoderKind}
        error={fields.decoder ?? fields['decoder.kind']}
        onChange={(event) => onChange({ decoderKind: event.target.value as Draft['decoderKind'] })}
        choices={[
          { value: '', label: 'not stated' },
          ...kinds.map((kind) => ({ value: kind, label: decoderName({ kind } as DecoderSpec) })),
        ]}
      />
      {!kept && (ITERATIVE as readonly string[]).includes(draft.decoderKind) && (
        <NumberField
          label="iterations, greatest"
          hint="a whole number from 1 to 1000; the decoder's own when empty"
          error={fields['decoder.iterations']}
          value={draft.iterations}
          onChange={(event) => onChange({ iterations: event.target.value })}
        />
      )}
    </>
  );
}

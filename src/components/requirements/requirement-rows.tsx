import type { Requirements } from '@/api/projects.ts';
import { decoderText } from '@/client/curves/decoder-text.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { Sci } from '@/components/ui/Sci.tsx';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { CHANNEL_NAMES, channelDetail } from './channel-text.ts';

const bits = (count: number) => {
  const bytes = count % 8 === 0 ? ` (${wholeNumber(count / 8)} bytes)` : '';
  return `${wholeNumber(count)} bits${bytes}`;
};

const STRUCTURE = { cyclic: 'cyclic', 'quasi-cyclic': 'quasi-cyclic', any: 'any' } as const;

function lengthWindow({ lengthMin, lengthMax }: Requirements): string | undefined {
  if (lengthMin === undefined && lengthMax === undefined) return undefined;
  if (lengthMax === undefined) return `at least ${wholeNumber(lengthMin!)}`;
  if (lengthMin === undefined) return `at most ${wholeNumber(lengthMax)}`;
  return `${wholeNumber(lengthMin)} to ${wholeNumber(lengthMax)}`;
}

/** What the project needs, line by line; what was left open is left out. */
export function requirementRows(r: Requirements): TitleRow[] {
  const window = lengthWindow(r);
  const lines: (TitleRow | undefined | '' | 0)[] = [
    r.channel && { label: 'Channel', value: CHANNEL_NAMES[r.channel.kind], note: channelDetail(r.channel) },
    r.targetBer && { label: 'Bit error rate', value: <Sci value={r.targetBer} prefix="≤" /> },
    r.targetFer && { label: 'Frame error rate', value: <Sci value={r.targetFer} prefix="≤" /> },
    r.targetUber && {
      label: 'UBER',
      value: <Sci value={r.targetUber} prefix="≤" />,
      note: 'Frame error rate by information bits a frame, the definition of JEDEC JESD218.',
    },
    r.payloadBits && { label: 'Payload', value: bits(r.payloadBits) },
    r.parityBits && { label: 'Parity budget', value: bits(r.parityBits) },
    window && { label: 'Length n', value: window },
    r.rateMin && { label: 'Rate, least', value: <Sci value={r.rateMin} /> },
    r.structure && { label: 'Structure', value: STRUCTURE[r.structure] },
    r.columnWeightMax && { label: 'Column weight, greatest', value: wholeNumber(r.columnWeightMax) },
    r.decoder && { label: 'Decoder', value: decoderText(r.decoder) },
  ];
  return lines.filter((line): line is TitleRow => Boolean(line));
}

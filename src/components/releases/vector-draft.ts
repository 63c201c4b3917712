import { z } from 'zod';
import { typedNumber } from '@/components/ui/typed-number.ts';
import { type Channel, channelSchema } from '@/core/channels/channel.ts';
import { type DecoderSpec, decoderSchema } from '@/core/decoders/decoder-spec.ts';
import { CHANNEL_PARAMS, type Draft as ChannelDraft, draftFrom, ITERATIVE } from '../requirements/draft.ts';

/** Test vectors as typed: every value a text. The channel part is the requirements form's own. */
export interface VectorDraft {
  channel: ChannelDraft;
  decoders: DecoderSpec['kind'][];
  /** One budget for all decoders that take one; their own when empty. */
  iterations: string;
  seed: string;
  count: string;
}

export const emptyVectorDraft: VectorDraft = {
  channel: { ...draftFrom(null), channelKind: 'bsc', channel: { p: '0.01' } },
  decoders: ['gallager-b'],
  iterations: '',
  seed: 'vectors-1',
  count: '100',
};

const HARD: readonly DecoderSpec['kind'][] = [
  'majority-logic',
  'gallager-a',
  'gallager-b',
  'bit-flipping',
  'bit-flipping-max',
  'gradient-descent',
  'finite-alphabet',
];
const SOFT: readonly DecoderSpec['kind'][] = ['sum-product', 'min-sum'];
const ERASURE: readonly DecoderSpec['kind'][] = ['peeling', 'elimination'];

/** The decoders that read this channel's outputs. */
export function decodersFor(channel: Channel['kind'] | ''): readonly DecoderSpec['kind'][] {
  if (channel === 'bec') return ERASURE;
  return channel === 'awgn' ? SOFT : [...HARD, ...SOFT];
}

const SHAPE = z.object({
  channel: channelSchema,
  decoders: z.array(decoderSchema).min(1, 'at least one decoder').max(8, 'at most 8 decoders'),
  seed: z.string().min(1, 'a text of 1 to 200 characters').max(200, 'a text of 1 to 200 characters'),
  count: z.int('a whole number from 1 to 100 000').min(1).max(100_000, 'a whole number from 1 to 100 000'),
});
export type VectorRequest = z.infer<typeof SHAPE>;

export type JudgedVectors = { ok: true; request: VectorRequest } | { ok: false; fields: Record<string, string> };

/** The request that the draft makes, or per field what would be accepted. */
export function judgeVectors({ channel, decoders, iterations, seed, count }: VectorDraft): JudgedVectors {
  const { channelKind } = channel;
  const params = channelKind === '' ? [] : (CHANNEL_PARAMS[channelKind] ?? []);
  const budget = typedNumber(iterations);
  const offered = decodersFor(channelKind);
  const parsed = SHAPE.safeParse({
    channel: {
      kind: channelKind,
      ...Object.fromEntries(params.map(({ name }) => [name, typedNumber(channel.channel[name] ?? '')])),
    },
    decoders: decoders
      .filter((kind) => offered.includes(kind))
      .map((kind) => ({ kind, ...(budget !== undefined && ITERATIVE.includes(kind) && { iterations: budget }) })),
    seed,
    count: typedNumber(count),
  });
  if (parsed.success) return { ok: true, request: parsed.data };
  const fields: Record<string, string> = {};
  for (const { path, message } of parsed.error.issues) {
    const [head, second, third] = path.map(String);
    if (head === 'channel') {
      const accepted = params.find(({ name }) => name === second)?.accepted;
      fields[`channel.${second ?? 'kind'}`] ??= accepted ?? 'a channel';
    } else if (third === 'iterations') fields.iterations ??= 'a whole number from 1 to 1000';
    else fields[head!] ??= head === 'count' ? 'a whole number from 1 to 100 000' : message;
  }
  return { ok: false, fields };
}

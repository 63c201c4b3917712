import type { z } from 'zod';
import { type Requirements, requirementsSchema } from '@/api/projects.ts';
import { typedNumber } from '@/components/ui/typed-number.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

/** Requirements as typed: every value a text, so that a half-written number is never lost. */
export interface Draft {
  summary: string;
  channelKind: '' | Channel['kind'];
  /** The channel's parameters by name. */
  channel: Record<string, string>;
  numbers: Record<NumberKey, string>;
  structure: string;
  decoderKind: '' | DecoderSpec['kind'];
  iterations: string;
  /** A decoder stated with more than its iterations is kept as it was until another kind is chosen. */
  keptDecoder?: DecoderSpec;
}

export const NUMBER_KEYS = [
  'targetBer',
  'targetFer',
  'targetUber',
  'payloadBits',
  'parityBits',
  'lengthMin',
  'lengthMax',
  'rateMin',
  'columnWeightMax',
] as const;
export type NumberKey = (typeof NUMBER_KEYS)[number];

/** Parameters of each channel that a requirement may name, with label and what is accepted. */
export const CHANNEL_PARAMS: Partial<Record<Channel['kind'], { name: string; label: string; accepted: string }[]>> = {
  bsc: [{ name: 'p', label: 'crossover probability p', accepted: 'a number above 0 and at most 0.5, such as 0.004' }],
  bec: [{ name: 'e', label: 'erasure probability e', accepted: 'a number above 0 and at most 1' }],
  awgn: [{ name: 'ebn0Db', label: 'Eb/N0, dB', accepted: 'a number from −10 to 30' }],
  'awgn-hard': [{ name: 'ebn0Db', label: 'Eb/N0, dB', accepted: 'a number from −10 to 30' }],
  z: [{ name: 'p', label: 'probability p that a one flips', accepted: 'a number above 0 and at most 1' }],
  'gilbert-elliott': [
    { name: 'pGood', label: 'p in the good state', accepted: 'a number from 0 to 0.5' },
    { name: 'pBad', label: 'p in the bad state', accepted: 'a number from 0 to 0.5' },
    { name: 'goodToBad', label: 'good to bad, a bit', accepted: 'a number above 0 and at most 1' },
    { name: 'badToGood', label: 'bad to good, a bit', accepted: 'a number above 0 and at most 1' },
  ],
};

const RATE = 'a number above 0 and below 1, such as 1e-9';
const COUNT = 'a whole number from 1 to 10 000 000';
const ACCEPTED: Record<string, string> = {
  summary: 'at most 4000 characters',
  targetBer: RATE,
  targetUber: RATE,
  payloadBits: COUNT,
  parityBits: COUNT,
  lengthMin: COUNT,
  rateMin: 'a number above 0 and below 1, such as 0.9',
  columnWeightMax: 'a whole number from 1 to 1000',
  'decoder.iterations': 'a whole number from 1 to 1000',
};

const text = (value: unknown) => (value === undefined ? '' : String(value));

export function draftFrom(r: Requirements | null): Draft {
  const { kind: channelKind, ...channel } = r?.channel ?? { kind: '' as const };
  const decoder = r?.decoder;
  const plain = !decoder || Object.keys(decoder).every((key) => key === 'kind' || key === 'iterations');
  return {
    summary: r?.summary ?? '',
    channelKind,
    channel: Object.fromEntries(Object.entries(channel).map(([name, value]) => [name, text(value)])),
    numbers: Object.fromEntries(NUMBER_KEYS.map((key) => [key, text(r?.[key])])) as Draft['numbers'],
    structure: r?.structure ?? '',
    decoderKind: decoder?.kind ?? '',
    iterations: decoder && 'iterations' in decoder ? text(decoder.iterations) : '',
    ...(plain ? {} : { keptDecoder: decoder }),
  };
}

export type Judged = { ok: true; requirements: Requirements } | { ok: false; fields: Record<string, string> };

/** Judges a draft by the interface's own schema; refusals are told per field, as what would be accepted. */
export function judge(draft: Draft): Judged {
  const parsed = requirementsSchema.safeParse(requestFrom(draft));
  if (parsed.success) return { ok: true, requirements: parsed.data };
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) {
    const path = issue.path.join('.');
    fields[path] ??= acceptedFor(path, issue, draft);
  }
  return { ok: false, fields };
}

function requestFrom(draft: Draft): unknown {
  const request: Record<string, unknown> = {};
  if (draft.summary.trim() !== '') request.summary = draft.summary.trim();
  for (const key of NUMBER_KEYS) request[key] = typedNumber(draft.numbers[key]);
  if (draft.structure !== '') request.structure = draft.structure;
  if (draft.channelKind !== '') {
    const names = CHANNEL_PARAMS[draft.channelKind]?.map((param) => param.name) ?? Object.keys(draft.channel);
    const values = names.map((name) => [name, typedNumber(draft.channel[name] ?? '')]);
    request.channel = { kind: draft.channelKind, ...Object.fromEntries(values) };
  }
  if (draft.keptDecoder && draft.keptDecoder.kind === draft.decoderKind) request.decoder = draft.keptDecoder;
  else if (draft.decoderKind !== '') request.decoder = decoderFrom(draft);
  return request;
}

/** Decoders that take an iteration budget; the rest end by themselves. */
export const ITERATIVE: readonly DecoderSpec['kind'][] = [
  'gallager-a',
  'gallager-b',
  'bit-flipping',
  'bit-flipping-max',
  'gradient-descent',
  'finite-alphabet',
  'sum-product',
  'min-sum',
];

function decoderFrom({ decoderKind, iterations }: Draft): unknown {
  const budget = typedNumber(iterations);
  const iterative = (ITERATIVE as readonly string[]).includes(decoderKind);
  return iterative && budget !== undefined ? { kind: decoderKind, iterations: budget } : { kind: decoderKind };
}

function acceptedFor(path: string, issue: z.core.$ZodIssue, draft: Draft): string {
  if (issue.code === 'custom') return issue.message;
  const [head, name] = path.split('.');
  if (path === 'targetFer') return RATE;
  if (path === 'lengthMax') return COUNT;
  if (head === 'channel' && draft.channelKind !== '') {
    const param = CHANNEL_PARAMS[draft.channelKind]?.find((p) => p.name === name);
    if (param) return param.accepted;
  }
  return ACCEPTED[path] ?? issue.message;
}

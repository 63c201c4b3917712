import { type NewRun, newRunSchema } from '@/api/runs.ts';
import { logSweep, parseList } from '@/client/curves/sweep.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

/** The decoders offered, in the order of the form. */
export const OFFERED_DECODERS = ['gallager-b', 'bit-flipping', 'majority-logic', 'sum-product'] as const;
export type OfferedDecoder = (typeof OFFERED_DECODERS)[number];

export interface DecoderDraft {
  isChosen: boolean;
  iterations: string;
  /** Empty: the decoder's own default, by column weight. */
  threshold: string;
  /** Empty: the channel's p at each point. */
  designP: string;
}

/** A run as it stands in the form: numbers are kept as typed. */
export interface RunDraft {
  /** Empty: the proposed name. */
  name: string;
  codeIds: readonly string[];
  decoders: Record<OfferedDecoder, DecoderDraft>;
  sweep: 'spaced' | 'listed';
  from: string;
  to: string;
  count: string;
  list: string;
  seed: string;
  framesPerShard: string;
  frameErrors: string;
  maxFrames: string;
}

export const MOST_SWEEP_POINTS = 200;

const decoderDraft = (iterations: string, isChosen = false): DecoderDraft => ({
  isChosen,
  iterations,
  threshold: '',
  designP: '',
});

export const emptyDraft = (): RunDraft => ({
  name: '',
  codeIds: [],
  decoders: {
    'gallager-b': decoderDraft('20', true),
    'bit-flipping': decoderDraft('20'),
    'majority-logic': decoderDraft(''),
    'sum-product': decoderDraft('50'),
  },
  sweep: 'spaced',
  from: '0.03',
  to: '0.01',
  count: '5',
  list: '',
  seed: '',
  framesPerShard: '2000',
  frameErrors: '100',
  maxFrames: '1000000',
});

/** What each field would accept, by its path in the form. */
export const ACCEPTED = {
  name: 'a name of 1 to 120 characters',
  codeIds: 'at least one code',
  decoders: 'at least one decoder',
  from: 'a crossover probability above 0 and at most 0.5',
  to: 'a crossover probability above 0 and at most 0.5',
  count: `a whole number of points from 1 to ${MOST_SWEEP_POINTS}`,
  list: 'crossover probabilities above 0 and at most 0.5, parted by spaces or commas',
  seed: 'a text of 1 to 200 characters',
  framesPerShard: 'a whole number of frames from 1 to 10 000 000',
  frameErrors: 'a whole number of frame errors from 1 to 1 000 000',
  maxFrames: 'a whole number of frames from 1 to 1 000 000 000 000',
  iterations: 'a whole number of iterations from 1 to 1000',
  threshold: 'a whole number of checks from 1, or nothing for the default',
  designP: 'a probability above 0 and below 0.5, or nothing for the channel’s own',
} as const;

export type FieldErrors = Partial<Record<string, string>>;

export interface Judged {
  /** Ready to send; null while something is not accepted. */
  run: NewRun | null;
  /** By field; fields of a decoder are "gallager-b.iterations". */
  errors: FieldErrors;
  /** Channel points of the sweep. */
  sweep: readonly number[];
  points: number;
  /** Most shards that the stopping rule allows over all points; null while it cannot be told. */
  mostShards: number | null;
}

/** Reads the form. Every refusal says what would be accepted. */
export function judgeDraft(draft: RunDraft, proposedName: string): Judged {
  const { sweep, errors: sweepErrors } = readSweep(draft);
  const chosen = OFFERED_DECODERS.filter((kind) => draft.decoders[kind].isChosen);
  const candidate = {
    name: draft.name.trim() || proposedName,
    seed: draft.seed,
    framesPerShard: numberOf(draft.framesPerShard),
    stopping: { frameErrors: numberOf(draft.frameErrors), maxFrames: numberOf(draft.maxFrames) },
    place: 'browser',
    points: draft.codeIds.flatMap((codeId) =>
      chosen.flatMap((kind) =>
        sweep.map((p) => ({ codeId, channel: { kind: 'bsc', p }, decoder: decoderOf(kind, draft.decoders[kind]) })),
      ),
    ),
  };
  const errors: FieldErrors = { ...sweepErrors };
  if (draft.codeIds.length === 0) errors.codeIds = ACCEPTED.codeIds;
  if (chosen.length === 0) errors.decoders = ACCEPTED.decoders;
  const parsed = newRunSchema.safeParse(candidate);
  for (const issue of parsed.error?.issues ?? [])
    Object.assign(errors, errorAt(issue.path.map(String), candidate.points));
  // Without codes there is no proposed name yet; that is told at the codes.
  if (draft.codeIds.length === 0 && draft.name.trim() === '') delete errors.name;
  const isFine = parsed.success && Object.keys(errors).length === 0;
  return {
    run: isFine ? parsed.data : null,
    errors,
    sweep,
    points: candidate.points.length,
    mostShards: shardCount(candidate.points.length, candidate.stopping.maxFrames, candidate.framesPerShard),
  };
}

/** Puts a refusal of the server, "points.3.decoder.threshold" or "framesPerShard", at the field it belongs to. */
export function serverErrors(fields: Readonly<Record<string, string>>, run: NewRun): FieldErrors {
  const errors: FieldErrors = {};
  for (const [path, accepted] of Object.entries(fields)) errors[fieldOf(path.split('.'), run.points)] = accepted;
  return errors;
}

interface Pointed {
  decoder: { kind: string };
}

function errorAt(path: readonly string[], points: readonly Pointed[]): FieldErrors {
  const field = fieldOf(path, points);
  const last = field.split('.').at(-1)!;
  const accepted = ACCEPTED[last as keyof typeof ACCEPTED];
  // An empty list of points is told at the codes, the decoders or the sweep that left it empty.
  return accepted === undefined ? {} : { [field]: accepted };
}

function fieldOf(path: readonly string[], points: readonly Pointed[]): string {
  const [head, index, part, inner] = path;
  if (head === 'stopping' && index !== undefined) return index;
  if (head !== 'points' || index === undefined) return head ?? '';
  if (part === 'decoder') return `${points[Number(index)]?.decoder.kind}.${inner ?? ''}`;
  return part === 'channel' ? 'list' : part === 'codeId' ? 'codeIds' : 'points';
}

function decoderOf(kind: OfferedDecoder, draft: DecoderDraft): DecoderSpec {
  if (kind === 'majority-logic') return { kind };
  const iterations = numberOf(draft.iterations);
  if (kind === 'sum-product') return { kind, iterations, ...optional('designP', draft.designP) };
  return { kind, iterations, ...optional('threshold', draft.threshold) };
}

const optional = <K extends string>(key: K, text: string): { [P in K]?: number } =>
  text.trim() === '' ? {} : ({ [key]: numberOf(text) } as { [P in K]: number });

/** A number as people type it: spaces between groups and 1e6 are fine; anything else is no number. */
export const numberOf = (text: string): number => {
  const plain = text.replaceAll(/[\s\u2009\u202f]/g, '');
  return plain === '' ? Number.NaN : Number(plain);
};

function readSweep(draft: RunDraft): { sweep: readonly number[]; errors: FieldErrors } {
  const inRange = (p: number) => p > 0 && p <= 0.5;
  if (draft.sweep === 'listed') {
    const { values, refused } = parseList(draft.list);
    const isFine = values.length > 0 && refused.length === 0 && values.every(inRange);
    return isFine ? { sweep: values, errors: {} } : { sweep: [], errors: { list: ACCEPTED.list } };
  }
  const [from, to, count] = [numberOf(draft.from), numberOf(draft.to), numberOf(draft.count)];
  const errors: FieldErrors = {};
  if (!inRange(from)) errors.from = ACCEPTED.from;
  if (!inRange(to)) errors.to = ACCEPTED.to;
  if (!Number.isInteger(count) || count < 1 || count > MOST_SWEEP_POINTS) errors.count = ACCEPTED.count;
  if (Object.keys(errors).length > 0) return { sweep: [], errors };
  return { sweep: logSweep(from, to, count), errors: {} };
}

function shardCount(points: number, maxFrames: number, framesPerShard: number): number | null {
  if (!(maxFrames >= 1) || !(framesPerShard >= 1)) return null;
  return points * Math.ceil(maxFrames / framesPerShard);
}

import { type NewRun, newRunSchema } from '@/api/runs.ts';
import { logSweep, parseList } from '@/client/curves/sweep.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

/** The decoders offered, in the order of the form. */
export const OFFERED_DECODERS = [
  'gallager-b',
  'bit-flipping',
  'majority-logic',
  'sum-product',
  'min-sum',
  'gallager-a',
  'bit-flipping-max',
  'gradient-descent',
  'finite-alphabet',
] as const;
export type OfferedDecoder = (typeof OFFERED_DECODERS)[number];

export interface DecoderDraft {
  isChosen: boolean;
  iterations: string;
  /** Empty: the decoder's own default, by column weight. */
  threshold: string;
  /** Empty: the channel's p at each point. */
  designP: string;
  /** Of min-sum: its schedule, the scale of its messages, and the magnitudes of channel values and messages; empty: by
   *  the column weight. */
  schedule: 'layered' | 'flooding';
  scale: MinSumScale | '';
  c: string;
  rMax: string;
}

export const MIN_SUM_SCALES = ['1/8', '1/4', '1/2', '3/4', '1', 'offset-1'] as const;
type MinSumScale = (typeof MIN_SUM_SCALES)[number];

/** A run as it stands in the form: numbers are kept as typed. */
export interface RunDraft {
  /** Empty: the proposed name. */
  name: string;
  codeIds: readonly string[];
  decoders: Record<OfferedDecoder, DecoderDraft>;
  /** What the points are: values of p, or numbers of errors. */
  points: 'sweep' | 'strata';
  sweep: 'spaced' | 'listed';
  from: string;
  to: string;
  count: string;
  list: string;
  weightFrom: string;
  weightTo: string;
  framesPerWeight: string;
  /** At which p the curve of the strata is to be read first. */
  targetP: string;
  seed: string;
  framesPerShard: string;
  frameErrors: string;
  maxFrames: string;
}

export const MOST_SWEEP_POINTS = 200;
export const MOST_WEIGHTS = 200;

const decoderDraft = (iterations: string, isChosen = false): DecoderDraft => ({
  isChosen,
  iterations,
  threshold: '',
  designP: '',
  schedule: 'layered',
  scale: '',
  c: '',
  rMax: '',
});

export const emptyDraft = (): RunDraft => ({
  name: '',
  codeIds: [],
  decoders: {
    'gallager-b': decoderDraft('20', true),
    'bit-flipping': decoderDraft('20'),
    'majority-logic': decoderDraft(''),
    'sum-product': decoderDraft('50'),
    'min-sum': decoderDraft('50'),
    'gallager-a': decoderDraft('20'),
    'bit-flipping-max': decoderDraft('20'),
    'gradient-descent': decoderDraft('100'),
    'finite-alphabet': decoderDraft('100'),
  },
  points: 'sweep',
  sweep: 'spaced',
  from: '0.03',
  to: '0.01',
  count: '5',
  list: '',
  weightFrom: '1',
  weightTo: '20',
  framesPerWeight: '100000',
  targetP: '0.01',
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
  weightFrom: 'a whole number of errors from 0, not above the last weight',
  weightTo: `a whole number of errors up to the shortest code’s length, at most ${MOST_WEIGHTS} weights in all`,
  framesPerWeight: 'a whole number of frames from 1 to 1 000 000 000 000',
  targetP: 'a crossover probability above 0 and at most 0.5',
  seed: 'a text of 1 to 200 characters',
  framesPerShard: 'a whole number of frames from 1 to 10 000 000',
  frameErrors: 'a whole number of frame errors from 1 to 1 000 000',
  maxFrames: 'a whole number of frames from 1 to 1 000 000 000 000',
  iterations: 'a whole number of iterations from 1 to 1000',
  threshold: 'a whole number of checks from 1, or nothing for the default',
  designP: 'a probability above 0 and below 0.5, or nothing for the channel’s own',
  statedP: 'a stated p above 0 and below 0.5: what fails at one weight must not depend on the channel’s own',
  c: 'a whole number from 1 to 126, or nothing for the default',
  rMax: 'a whole number from 1 to 126, or nothing for the largest that cannot saturate',
} as const;

export type FieldErrors = Partial<Record<string, string>>;

export interface Judged {
  /** Ready to send; null while something is not accepted. */
  run: NewRun | null;
  /** By field; fields of a decoder are "gallager-b.iterations". */
  errors: FieldErrors;
  /** Channel points of the sweep. */
  sweep: readonly number[];
  /** Numbers of errors, where the points are strata. */
  weights: readonly number[];
  points: number;
  /** Most shards that the stopping rule allows over all points; null while it cannot be told. */
  mostShards: number | null;
}

/** Reads the form. Every refusal says what would be accepted.
 *  @param shortest Length of the shortest chosen code, which no weight may pass. */
export function judgeDraft(draft: RunDraft, proposedName: string, shortest = Number.POSITIVE_INFINITY): Judged {
  const areStrata = draft.points === 'strata';
  const { channels, sweep, weights, errors: channelErrors } = channelsOf(draft, shortest);
  const chosen = OFFERED_DECODERS.filter((kind) => draft.decoders[kind].isChosen);
  const candidate = {
    name: draft.name.trim() || proposedName,
    seed: draft.seed,
    framesPerShard: numberOf(draft.framesPerShard),
    stopping: stoppingOf(draft),
    place: 'browser',
    points: draft.codeIds.flatMap((codeId) =>
      chosen.flatMap((kind) =>
        channels.map((channel) => ({ codeId, channel, decoder: decoderOf(kind, draft.decoders[kind]) })),
      ),
    ),
  };
  const errors: FieldErrors = { ...channelErrors };
  if (draft.codeIds.length === 0) errors.codeIds = ACCEPTED.codeIds;
  if (chosen.length === 0) errors.decoders = ACCEPTED.decoders;
  const parsed = newRunSchema.safeParse(candidate);
  for (const issue of parsed.error?.issues ?? [])
    Object.assign(errors, errorAt(issue.path.map(String), candidate.points));
  if (areStrata) {
    if (errors.maxFrames) errors.framesPerWeight = ACCEPTED.framesPerWeight;
    delete errors.maxFrames;
    if (chosen.includes('sum-product') && draft.decoders['sum-product'].designP.trim() === '')
      errors['sum-product.designP'] = ACCEPTED.statedP;
  }
  // Without codes there is no proposed name yet; that is told at the codes.
  if (draft.codeIds.length === 0 && draft.name.trim() === '') delete errors.name;
  const isFine = parsed.success && Object.keys(errors).length === 0;
  return {
    run: isFine ? parsed.data : null,
    errors,
    sweep,
    weights,
    points: candidate.points.length,
    mostShards: shardCount(candidate.points.length, candidate.stopping.maxFrames, candidate.framesPerShard),
  };
}

/** Strata end at a set number of frames: their limits are exact for such samples, not for those that stop on errors. */
function stoppingOf(draft: RunDraft): { frameErrors?: number; maxFrames: number } {
  if (draft.points === 'strata') return { maxFrames: numberOf(draft.framesPerWeight) };
  return { frameErrors: numberOf(draft.frameErrors), maxFrames: numberOf(draft.maxFrames) };
}

interface DraftChannels {
  channels: Channel[];
  sweep: readonly number[];
  weights: readonly number[];
  errors: FieldErrors;
}

function channelsOf(draft: RunDraft, shortest: number): DraftChannels {
  if (draft.points === 'sweep') {
    const { sweep, errors } = readSweep(draft);
    return { channels: sweep.map((p) => ({ kind: 'bsc', p })), sweep, weights: [], errors };
  }
  const { weights, errors } = readWeights(draft, shortest);
  return { channels: weights.map((weight) => ({ kind: 'stratum', weight })), sweep: [], weights, errors };
}

function readWeights(draft: RunDraft, shortest: number): { weights: readonly number[]; errors: FieldErrors } {
  const [from, to, target] = [numberOf(draft.weightFrom), numberOf(draft.weightTo), numberOf(draft.targetP)];
  const errors: FieldErrors = {};
  if (!(Number.isInteger(to) && to >= 0 && to <= shortest)) errors.weightTo = ACCEPTED.weightTo;
  if (!(Number.isInteger(from) && from >= 0) || from > to) errors.weightFrom = ACCEPTED.weightFrom;
  if (!errors.weightTo && !errors.weightFrom && to - from >= MOST_WEIGHTS) errors.weightTo = ACCEPTED.weightTo;
  if (!(target > 0 && target <= 0.5)) errors.targetP = ACCEPTED.targetP;
  if (errors.weightFrom || errors.weightTo) return { weights: [], errors };
  return { weights: Array.from({ length: to - from + 1 }, (_, i) => from + i), errors };
}

/** Puts a refusal of the server, "points.3.decoder.threshold" or "framesPerShard", at the field it belongs to. */
export function serverErrors(fields: Readonly<Record<string, string>>, run: NewRun): FieldErrors {
  const errors: FieldErrors = {};
  for (const [path, accepted] of Object.entries(fields)) errors[fieldOf(path.split('.'), run.points ?? [])] = accepted;
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
  if (part === 'channel') return inner === 'weight' ? 'weightTo' : 'list';
  return part === 'codeId' ? 'codeIds' : 'points';
}

export function decoderOf(kind: OfferedDecoder, draft: DecoderDraft): DecoderSpec {
  if (kind === 'majority-logic') return { kind };
  const iterations = numberOf(draft.iterations);
  if (kind === 'min-sum') {
    const { schedule, scale } = draft;
    const stated = scale === '' ? {} : { scale };
    return { kind, iterations, schedule, ...stated, ...optional('c', draft.c), ...optional('rMax', draft.rMax) };
  }
  if (kind === 'gradient-descent') return { kind, iterations, flips: 'multi' };
  if (kind === 'gallager-a' || kind === 'bit-flipping-max' || kind === 'finite-alphabet') return { kind, iterations };
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

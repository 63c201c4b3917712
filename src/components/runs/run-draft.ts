import { type Goal, type NewRun, newRunSchema, type Place } from '@/api/runs.ts';
import { logSweep, parseList } from '@/client/curves/sweep.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { goalErrors, goalField, goalOf } from './goal-draft.ts';
import { numberOf } from './number-of.ts';
import { ACCEPTED, type FieldErrors } from './run-accepted.ts';

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
  /** What the points are: values of p, or numbers of errors; stated one by one, or left to the planner. */
  points: 'sweep' | 'curve' | 'strata' | 'limit';
  sweep: 'spaced' | 'listed';
  from: string;
  to: string;
  count: string;
  list: string;
  weightFrom: string;
  weightTo: string;
  framesPerWeight: string;
  /** At which p the curve of the strata is to be read first, or the limit to be shown. */
  targetP: string;
  /** Of a planned curve. */
  mostPoints: string;
  /** Of a limit to be shown: which rate keeps it, and with which confidence. */
  limitRate: 'fer' | 'uber';
  limitTarget: string;
  limitLevel: string;
  place: Place;
  seed: string;
  framesPerShard: string;
  frameErrors: string;
  maxFrames: string;
  /** Seconds of work on the whole run; empty: as long as it takes. */
  seconds: string;
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
  mostPoints: '12',
  limitRate: 'fer',
  limitTarget: '1e-9',
  limitLevel: '0.95',
  place: 'browser',
  seed: '',
  framesPerShard: '2000',
  frameErrors: '100',
  maxFrames: '1000000',
  seconds: '',
});

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
  const decoders = chosen.map((kind) => decoderOf(kind, draft.decoders[kind]));
  const goal = goalOf(draft, draft.codeIds, decoders);
  const candidate = {
    name: draft.name.trim() || proposedName,
    seed: draft.seed,
    framesPerShard: numberOf(draft.framesPerShard),
    stopping: stoppingOf(draft),
    place: draft.place,
    ...(goal && { goal }),
    points: draft.codeIds.flatMap((codeId) =>
      decoders.flatMap((decoder) => channels.map((channel) => ({ codeId, channel, decoder }))),
    ),
  };
  const errors: FieldErrors = { ...channelErrors };
  const parsed = newRunSchema.safeParse(candidate);
  for (const issue of parsed.error?.issues ?? [])
    Object.assign(errors, errorAt(issue.path.map(String), candidate.points, goal));
  if (draft.codeIds.length === 0) errors.codeIds = ACCEPTED.codeIds;
  if (chosen.length === 0) errors.decoders = ACCEPTED.decoders;
  Object.assign(errors, goalErrors(draft, decoders));
  if (areStrata && errors.maxFrames) {
    errors.framesPerWeight = ACCEPTED.framesPerWeight;
    delete errors.maxFrames;
  }
  if ((areStrata || draft.points === 'limit') && chosen.includes('sum-product')) {
    if (draft.decoders['sum-product'].designP.trim() === '') errors['sum-product.designP'] = ACCEPTED.statedP;
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

/** Strata end at a set number of frames: their limits are exact for such samples, not for those that stop on errors.
 *  The planner of a limit sets the frames of each stage itself, up to the cap. */
function stoppingOf(draft: RunDraft): NewRun['stopping'] {
  const seconds = draft.seconds.trim() === '' ? {} : { seconds: numberOf(draft.seconds) };
  if (draft.points === 'strata') return { maxFrames: numberOf(draft.framesPerWeight), ...seconds };
  const frameErrors =
    draft.points === 'limit' || draft.frameErrors.trim() === '' ? {} : { frameErrors: numberOf(draft.frameErrors) };
  return { ...frameErrors, maxFrames: numberOf(draft.maxFrames), ...seconds };
}

interface DraftChannels {
  channels: Channel[];
  sweep: readonly number[];
  weights: readonly number[];
  errors: FieldErrors;
}

function channelsOf(draft: RunDraft, shortest: number): DraftChannels {
  // The planner chooses them.
  if (draft.points === 'curve' || draft.points === 'limit') return { channels: [], sweep: [], weights: [], errors: {} };
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
  for (const [path, accepted] of Object.entries(fields))
    errors[fieldOf(path.split('.'), run.points ?? [], run.goal)] = accepted;
  return errors;
}

interface Pointed {
  decoder: { kind: string };
}

function errorAt(path: readonly string[], points: readonly Pointed[], goal: Goal | null): FieldErrors {
  const field = fieldOf(path, points, goal);
  const last = field.split('.').at(-1)!;
  const accepted = ACCEPTED[last as keyof typeof ACCEPTED];
  // An empty list of points is told at the codes, the decoders or the sweep that left it empty.
  return accepted === undefined ? {} : { [field]: accepted };
}

function fieldOf(path: readonly string[], points: readonly Pointed[], goal: Goal | null | undefined): string {
  const [head, index, part, inner] = path;
  if (head === 'goal') return goalField(goal, path.slice(1));
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

import { channelSchema } from '../channels/channel.ts';
import { decoderSchema } from '../decoders/decoder-spec.ts';
import { ParamError } from '../errors.ts';
import type { RunSpec } from './run-spec.ts';

/** The most frames a shard may hold: sums of squares of bit errors must stay below 2^53. */
const mostFrames = 10_000_000;

/** Refuses a spec whose parts are out of range, whatever its matrix; what depends on the matrix is refused where the
 *  decoder and the patterns are made.
 *  @throws ParamError naming the part. */
export function validateSpec(spec: RunSpec): void {
  refuse('channel', channelSchema.safeParse(spec.channel), spec.channel);
  refuse('decoder', decoderSchema.safeParse(spec.decoder), spec.decoder);
  const { framesPerShard: frames, rate, H } = spec;
  if (!Number.isInteger(frames) || frames < 1 || frames > mostFrames)
    throw new ParamError('framesPerShard', frames, `a whole number of frames from 1 to ${mostFrames}`);
  if (rate !== undefined && !(rate > 0 && rate <= 1)) throw new ParamError('rate', rate, 'k/n, above 0 and at most 1');
  if (H.rows < 1 || H.cols < 1) throw new ParamError('H', `${H.rows} × ${H.cols}`, 'a matrix of at least 1 × 1');
  if (spec.channel.kind === 'stratum' && spec.channel.weight > H.cols)
    throw new ParamError('channel.weight', spec.channel.weight, `a weight from 0 to ${H.cols}`);
}

type Parsed = { success: boolean; error?: { issues: { path: PropertyKey[]; message: string }[] } };

function refuse(part: string, parsed: Parsed, given: unknown): void {
  const issue = parsed.error?.issues[0];
  if (!issue) return;
  const value = issue.path.reduce<unknown>((at, key) => (at as Record<PropertyKey, unknown> | undefined)?.[key], given);
  throw new ParamError([part, ...issue.path.map(String)].join('.'), value, issue.message);
}

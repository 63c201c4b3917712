import type { Channel } from '../channels/channel.ts';
import { channelSchema } from '../channels/channel.ts';
import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { nearestWord } from '../decoders/nearest-word.ts';
import { ParamError } from '../errors.ts';
import { createPatternSource } from './patterns.ts';
import { positionBelow, randomOf } from './random.ts';
import { drive, type ShardOptions } from './shard.ts';

export interface NearestWordSpec {
  /** The code's words, one a row. */
  words: SparseMatrix;
  channel: Extract<Channel, { kind: 'bsc' | 'z' | 'gilbert-elliott' | 'stratum' }>;
  seed: string;
  framesPerShard: number;
  /** A received word farther than this from the nearest one is given up as detected; none is when not given. */
  detectionRadius?: number;
}

/** What a set of decoded words came to; exact integers. */
export interface WordTally {
  frames: number;
  /** Frames not given up whose word is not the one sent. */
  wordErrors: number;
  /** Wrong message bits of those frames. */
  messageBitErrors: number;
  detected: number;
  /** frames × message bits. */
  messageBits: number;
}

/** ⌊log2 M⌋: the message is the index of a word in natural binary, so that only the first 2^that many words are sent;
 *  all M are decoded to. */
export function messageLength(words: number): number {
  return 31 - Math.clz32(words);
}

/** Sends uniformly random messages and decodes to the nearest word. A wrong index past the last message differs from
 *  the message in its low bits.
 *  @throws ParamError on a spec out of range, or words too few to carry a bit. */
export async function runNearestWordShard(
  spec: NearestWordSpec,
  index: number,
  options: ShardOptions = {},
): Promise<WordTally> {
  const channel = channelSchema.safeParse(spec.channel);
  if (!channel.success) throw new ParamError('channel', spec.channel, channel.error.issues[0]!.message);
  if (!Number.isInteger(spec.framesPerShard) || spec.framesPerShard < 1)
    throw new ParamError('framesPerShard', spec.framesPerShard, 'a whole number of frames from 1');
  if (spec.words.rows < 2) throw new ParamError('words', spec.words.rows, 'at least two words, to carry a bit');
  return drive(decoding(spec, index), options);
}

/** Edge visits between two pauses. */
const visitsPerPause = 2_000_000;

async function* decoding(spec: NearestWordSpec, index: number): AsyncGenerator<number, WordTally> {
  const { words, channel, seed, framesPerShard, detectionRadius = Number.POSITIVE_INFINITY } = spec;
  const bits = messageLength(words.rows);
  const patterns = await createPatternSource({ H: words, channel, seed }, index);
  const messages = await randomOf(seed, index, 'sent');
  const { decode } = nearestWord(words);
  const received = new Uint8Array(words.cols);
  const positions = new Uint32Array(words.cols);
  const tally = { frames: framesPerShard, wordErrors: 0, messageBitErrors: 0, detected: 0, messageBits: 0 };
  tally.messageBits = framesPerShard * bits;
  const framesPerPause = Math.max(1, Math.floor(visitsPerPause / (words.colIndex.length + words.rows)));
  for (let frame = 0; frame < framesPerShard; frame++) {
    const message = positionBelow(2 ** bits, messages);
    received.fill(0);
    for (const j of rowOf(words, message)) received[j] = 1;
    const count = patterns.next(positions);
    for (const j of positions.subarray(0, count)) if (channel.kind !== 'z' || received[j] === 1) received[j]! ^= 1;
    const nearest = decode(received);
    if (nearest.distance > detectionRadius) tally.detected += 1;
    else if (nearest.index !== message) {
      tally.wordErrors += 1;
      tally.messageBitErrors += onesBelow(nearest.index ^ message, bits);
    }
    if (frame % framesPerPause === framesPerPause - 1) yield frame;
  }
  return tally;
}

function onesBelow(difference: number, bits: number): number {
  let count = 0;
  for (let b = 0; b < bits; b++) count += (difference >>> b) & 1;
  return count;
}

import type { Channel } from '../channels/channel.ts';
import { systematicEncoder } from '../codes/encode/systematic-encoder.ts';
import { type SparseMatrix, syndrome } from '../codes/sparse-matrix.ts';
import { createDecoder } from '../decoders/create-decoder.ts';
import { erased } from '../decoders/decoder.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { LimitError, ParamError } from '../errors.ts';
import { createFrameSource } from '../simulation/frames.ts';
import { validateSpec } from '../simulation/validate-spec.ts';

/** All that test vectors depend on: the same request gives the same vectors everywhere. */
export interface VectorRequest {
  channel: Channel;
  decoders: DecoderSpec[];
  seed: string;
  /** How many frames. */
  count: number;
}

/** What one decoder makes of one frame. */
export interface DecoderVector {
  /** Bits left erased hold the mark 2. */
  output: Uint8Array;
  iterations: number;
  /** Whether every check holds for the output. */
  converged: boolean;
  /** Positions in which the output differs from the codeword. */
  bitErrors: number;
}

export interface TestVector {
  frame: number;
  info: Uint8Array;
  codeword: Uint8Array;
  /** Where the received hard word differs from the codeword; on the erasure channel, what was erased. */
  error: Uint8Array;
  /** Hard bits, erased ones as 0; the sign of the outputs on the Gaussian channel. */
  received: Uint8Array;
  /** The channel's outputs themselves, where they are real. */
  outputs?: Float64Array;
  /** Of the received hard word. */
  syndrome: Uint8Array;
  decoders: DecoderVector[];
}

export const vectorLimits = { frames: 100_000, decoders: 8 } as const;

/** @throws ParamError naming what is wrong, LimitError on too many frames or decoders. */
export function validateVectorRequest(H: SparseMatrix, request: VectorRequest): void {
  const { count, decoders, channel, seed } = request;
  if (!Number.isInteger(count) || count < 1)
    throw new ParamError('count', count, `a whole number of frames from 1 to ${vectorLimits.frames}`);
  if (count > vectorLimits.frames) throw new LimitError('test vectors', count, vectorLimits.frames, 'frames');
  if (decoders.length < 1) throw new ParamError('decoders', 'none', 'at least one decoder');
  if (decoders.length > vectorLimits.decoders)
    throw new LimitError('test vectors', decoders.length, vectorLimits.decoders, 'decoders');
  for (const decoder of decoders) validateSpec({ H, channel, decoder, seed, framesPerShard: count });
}

/** The vectors, frame by frame. Codewords are random; they and the noise are those of shard 0 of a run with this seed
 *  that sends random words, so that a run can be held against its vectors.
 *  @throws as validateVectorRequest, and ParamError where a decoder does not read the channel's outputs. */
export async function* testVectors(H: SparseMatrix, request: VectorRequest): AsyncGenerator<TestVector> {
  validateVectorRequest(H, request);
  const { channel, seed, count } = request;
  const { infoPositions, k } = systematicEncoder({ H });
  const rate = k / H.cols;
  const decoders = request.decoders.map((spec) => createDecoder(H, spec, channel, rate));
  const spec = {
    H,
    channel,
    decoder: request.decoders[0]!,
    seed,
    framesPerShard: count,
    rate,
    sent: 'random',
  } as const;
  const frames = await createFrameSource(spec, 0);
  for (let frame = 0; frame < count; frame++) {
    const { sent, received } = frames.next();
    const codeword = sent.slice();
    const hard = hardWord(received);
    yield {
      frame,
      info: Uint8Array.from(infoPositions, (c) => codeword[c]!),
      codeword,
      error: errorWord(codeword, received, hard),
      received: hard,
      ...(received instanceof Float64Array && { outputs: received.slice() }),
      syndrome: syndrome(H, hard),
      decoders: decoders.map((decoder) => {
        const { word, iterations, converged } = decoder.decode(received);
        return { output: word.slice(), iterations, converged, bitErrors: differing(word, codeword) };
      }),
    };
  }
}

function hardWord(received: Uint8Array | Float64Array): Uint8Array {
  if (received instanceof Float64Array) return Uint8Array.from(received, (y) => (y < 0 ? 1 : 0));
  return received.map((bit) => (bit === erased ? 0 : bit));
}

function errorWord(codeword: Uint8Array, received: Uint8Array | Float64Array, hard: Uint8Array): Uint8Array {
  const erasures = received instanceof Uint8Array && received.includes(erased);
  return codeword.map((bit, j) => (erasures ? Number(received[j] === erased) : bit ^ hard[j]!));
}

function differing(a: Uint8Array, b: Uint8Array): number {
  let count = 0;
  for (let j = 0; j < a.length; j++) if (a[j] !== b[j]) count++;
  return count;
}

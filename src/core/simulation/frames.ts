import { noiseDeviation } from '../channels/awgn.ts';
import { createGaussian } from '../channels/gaussian.ts';
import { decodesErasures } from '../decoders/create-decoder.ts';
import { erased, type Received } from '../decoders/decoder.ts';
import { createCodewordSource } from './codewords.ts';
import { createPatternSource } from './patterns.ts';
import { randomOf } from './random.ts';
import type { RunSpec } from './run-spec.ts';

export interface Frame {
  sent: Uint8Array;
  received: Received;
}

/** The frames of one shard as a decoder meets them, in frame order. */
export interface FrameSource {
  /** The next frame; its buffers are used again for the one after. */
  next(): Frame;
}

/** Frames of shard `index`: codewords from a stream of their own, noise from the errors' stream. */
export async function createFrameSource(spec: RunSpec, index: number): Promise<FrameSource> {
  const sender = await createSender(spec, index);
  return spec.channel.kind === 'awgn'
    ? gaussianFrames(spec, spec.channel.ebn0Db, sender, await randomOf(spec.seed, index))
    : patternFrames(spec, sender, await createPatternSource(spec, index));
}

type Sender = () => Uint8Array;

async function createSender(spec: RunSpec, index: number): Promise<Sender> {
  const sent = spec.sent ?? (spec.channel.kind === 'z' ? 'random' : 'zero');
  if (sent === 'random') return createCodewordSource(spec.H, await randomOf(spec.seed, index, 'sent'));
  const zero = new Uint8Array(spec.H.cols);
  return () => zero;
}

function patternFrames(
  { H, channel, decoder }: RunSpec,
  send: Sender,
  source: Awaited<ReturnType<typeof createPatternSource>>,
): FrameSource {
  const received = new Uint8Array(H.cols);
  const positions = new Uint32Array(H.cols);
  const erasing = decodesErasures(decoder);
  return {
    next() {
      const sent = send();
      received.set(sent);
      const count = source.next(positions);
      for (let i = 0; i < count; i++) {
        const j = positions[i]!;
        if (erasing) received[j] = erased;
        else if (channel.kind !== 'z' || sent[j] === 1) received[j]! ^= 1;
      }
      return { sent, received };
    },
  };
}

/** BPSK, 0 → +1 and 1 → −1. The noise is drawn for the all-zero word and turned round where a one is sent, so that a
 *  frame has the same errors whatever was sent. */
function gaussianFrames(
  { H, rate }: RunSpec,
  ebn0Db: number,
  send: Sender,
  random: Awaited<ReturnType<typeof randomOf>>,
): FrameSource {
  const deviation = noiseDeviation(ebn0Db, rate);
  const gaussian = createGaussian(random);
  const received = new Float64Array(H.cols);
  return {
    next() {
      const sent = send();
      for (let j = 0; j < H.cols; j++) {
        const output = 1 + deviation * gaussian();
        received[j] = sent[j] === 1 ? -output : output;
      }
      return { sent, received };
    },
  };
}

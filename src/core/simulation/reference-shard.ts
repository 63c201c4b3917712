import { systematicEncoder } from '../codes/encode/systematic-encoder.ts';
import { createDecoder } from '../decoders/create-decoder.ts';
import { createFrameSource } from './frames.ts';
import type { RunSpec } from './run-spec.ts';
import type { Tally } from './tally.ts';
import { keepTally } from './tally-frame.ts';

/** Decoder steps between two pauses, about 10 ms of work: a step walks the edges a few times, at some 10 ns an edge, or
 *  some 150 ns where it takes a hyperbolic tangent and its inverse at each. */
function stepsPerPause({ H, decoder }: RunSpec): number {
  const stages = decoder.kind === 'two-stage' ? decoder.stages : [decoder];
  const edges = stages.some(({ kind }) => kind === 'sum-product') ? 40_000 : 400_000;
  return Math.max(1, Math.floor(edges / Math.max(H.colIndex.length, 1)));
}

/** The shard as the definitions say it, one frame at a time. Hands back control after every 10 ms of work or so, with
 *  the frames done so far, so that whoever drives it can stop or let others work. */
export async function* referenceShard(spec: RunSpec, index: number): AsyncGenerator<number, Tally> {
  const frames = await createFrameSource(spec, index);
  const decoder = createDecoder(spec.H, spec.decoder, spec.channel, spec.rate);
  const information = spec.bits === 'information' ? systematicEncoder(spec).infoPositions : undefined;
  const keeper = keepTally(spec.H.cols, information);
  const budget = stepsPerPause(spec);
  let steps = 0;
  for (let done = 0; done < spec.framesPerShard; done++) {
    const { sent, received } = frames.next();
    decoder.begin(received);
    let decoded = decoder.step();
    for (; !decoded; decoded = decoder.step()) if (++steps % budget === 0) yield done;
    if (++steps % budget === 0) yield done;
    keeper.add(sent, decoded);
  }
  return keeper.tally();
}

import { type LaneRule, laneRule } from '../decoders/lane-rules.ts';
import { iterationCap } from '../decoders/settings.ts';
import { tannerGraph } from '../decoders/tanner-graph.ts';
import { createFrameSource, type FrameSource } from './frames.ts';
import type { RunSpec } from './run-spec.ts';
import { emptyTally, type Tally } from './tally.ts';

/** The shard in plain TypeScript, 32 frames at a time: for engines without SIMD, and for channels that no kernel draws.
 *  Null where the decoder has no rule in lanes, or the channel does not give errors. Equal to the reference to the last
 *  integer. A lane whose frame has ended takes the next one; at the end all frames of the shard are decoded to theirs. */
export function laneShard(spec: RunSpec, index: number): AsyncGenerator<number, Tally> | null {
  const { channel, bits, H, decoder } = spec;
  if (channel.kind === 'awgn' || channel.kind === 'bec' || bits === 'information') return null;
  const rule = laneRule(tannerGraph(H), decoder);
  return rule && decodeLanes(spec, index, rule);
}

/** Edges walked between two pauses, some 3 ns each. */
const edgesPerPause = 3_000_000;

async function* decodeLanes(spec: RunSpec, index: number, rule: LaneRule): AsyncGenerator<number, Tally> {
  const { H, framesPerShard } = spec;
  const cap = iterationCap(spec.decoder);
  const frames = await createFrameSource(spec, index);
  const syndrome = new Int32Array(H.rows);
  const ages = new Uint32Array(32);
  const keeper = laneKeeper(rule.word, ages);
  const roundsPerPause = Math.max(1, Math.floor(edgesPerPause / (3 * H.colIndex.length)));
  let drawn = 0;
  let busy = 0;
  for (let round = 1; busy !== 0 || drawn < framesPerShard; round++) {
    const free = lowestLanes(~busy, framesPerShard - drawn);
    if (free !== 0) {
      drawn += fillLanes(frames, rule.word, free);
      rule.load(free);
      eachLane(free, (lane) => {
        ages[lane] = 0;
      });
      busy |= free;
    }
    const failing = laneSyndrome(spec, rule.word, syndrome);
    let capped = 0;
    eachLane(busy, (lane) => {
      if (ages[lane] === cap) capped |= 1 << lane;
    });
    const going = busy & failing & ~capped;
    keeper.end(busy & ~going, failing);
    busy = going === 0 ? 0 : going & rule.iterate(going, syndrome);
    // An iteration that changes nothing ends the frame and is not counted.
    keeper.end(going & ~busy, failing);
    eachLane(busy, (lane) => {
      ages[lane]! += 1;
    });
    if (round % roundsPerPause === 0) yield drawn;
  }
  return { ...keeper.tally, bits: framesPerShard * H.cols, frames: framesPerShard };
}

/** The lowest of these lanes, at most so many. */
function lowestLanes(lanes: number, most: number): number {
  let kept = 0;
  let count = 0;
  for (let rest = lanes; rest !== 0 && count < most; rest &= rest - 1, count++) kept |= rest & -rest;
  return kept;
}

function eachLane(lanes: number, visit: (lane: number) => void): void {
  for (let rest = lanes; rest !== 0; rest &= rest - 1) visit(31 - Math.clz32(rest & -rest));
}

/** Puts the next frames, as their errors, into these lanes, lowest first. The decoders are symmetric, so that what was
 *  sent does not matter beyond the errors it met. */
function fillLanes(frames: FrameSource, word: Int32Array, lanes: number): number {
  let count = 0;
  for (let j = 0; j < word.length; j++) word[j]! &= ~lanes;
  eachLane(lanes, (lane) => {
    const { sent, received } = frames.next();
    for (let j = 0; j < word.length; j++) word[j]! |= (received[j]! ^ sent[j]!) << lane;
    count += 1;
  });
  return count;
}

/** Writes the syndrome of every lane and returns the lanes in which some check fails. */
function laneSyndrome({ H }: RunSpec, word: Int32Array, into: Int32Array): number {
  let failing = 0;
  for (let i = 0; i < H.rows; i++) {
    let sum = 0;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
    into[i] = sum;
    failing |= sum;
  }
  return failing;
}

/** Counts the frames that end in lanes. */
function laneKeeper(word: Int32Array, ages: Uint32Array) {
  const tally = emptyTally();
  const wrong = new Uint32Array(32);
  return {
    tally,
    end(lanes: number, failing: number): void {
      if (lanes === 0) return;
      wrong.fill(0);
      for (let j = 0; j < word.length; j++) {
        for (let rest = word[j]! & lanes; rest !== 0; rest &= rest - 1) wrong[31 - Math.clz32(rest & -rest)]! += 1;
      }
      eachLane(lanes, (lane) => {
        const errors = wrong[lane]!;
        const iterations = ages[lane]!;
        tally.iterations += iterations;
        tally.bitErrors += errors;
        tally.bitErrorsSquared += errors ** 2;
        if (errors > 0) tally.frameErrors += 1;
        if (errors > 0 && ((failing >>> lane) & 1) === 0) tally.undetected += 1;
        while (tally.iterationHistogram.length <= iterations) tally.iterationHistogram.push(0);
        tally.iterationHistogram[iterations]! += 1;
      });
    },
  };
}

import { ParamError } from '../errors.ts';

export interface IterationSummary {
  mean: number;
  /** Least number of iterations within which that share of the frames ended. */
  median: number;
  p99: number;
  p999: number;
  largest: number;
}

/** What a decoder's latency looks like, from the histogram of a tally: entry i counts frames that ended after i.
 *  @throws ParamError on a histogram without frames. */
export function summariseIterations(histogram: readonly number[]): IterationSummary {
  const frames = histogram.reduce((sum, count) => sum + count, 0);
  if (frames === 0) throw new ParamError('iterationHistogram', frames, 'a histogram of at least one frame');
  const within = (share: number) => {
    let ended = 0;
    return histogram.findIndex((count) => {
      ended += count;
      return ended >= share * frames;
    });
  };
  return {
    mean: histogram.reduce((sum, count, i) => sum + count * i, 0) / frames,
    median: within(0.5),
    p99: within(0.99),
    p999: within(0.999),
    largest: histogram.findLastIndex((count) => count > 0),
  };
}

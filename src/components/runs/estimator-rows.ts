import type { Point } from '@/api/runs.ts';
import type { Estimate } from '@/client/curves/curve.ts';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { decoderCard, edgeVisitsPerBit } from '@/core/decoders/catalogue.ts';
import type { Grade } from '@/core/evidence.ts';
import { binomialInterval, zeroErrorUpperLimit } from '@/core/statistics/binomial-interval.ts';
import { summariseIterations } from '@/core/statistics/iteration-summary.ts';
import { intervalText, levelText, rateText, scientific } from '../charts/rate-text.ts';

export interface EstimatorRow {
  label: string;
  text: string;
  grade: Grade;
  note: string;
}

/** What a point with frames comes to.
 *  @param ones Edges of the Tanner graph; null while they are not known. */
export function estimatorRows(point: Point, ones: number | null): EstimatorRow[] {
  if (point.tally.frames === 0) return [];
  return [
    ...ferRows(point),
    undetectedRow(point),
    iterationRow(point),
    ...(ones === null ? [] : [costRow(point, ones)]),
  ];
}

/** The plain share, and beside it the estimate for a point that stopped on its errors. */
function ferRows({ tally, interval, level, stopped }: Point): EstimatorRow[] {
  const { frames, frameErrors } = tally;
  const plain = { value: frameErrors === 0 ? null : frameErrors / frames, ...interval };
  const rows = [
    rateRow('FER, errors over frames', plain, `${levelText(level)} Clopper–Pearson, exact for a set number of frames`),
  ];
  if (stopped) {
    const estimate = { value: stopped.estimate, lower: stopped.lower, upper: stopped.upper };
    const note = `${levelText(level)}; suits stopping on errors: (N − 1)/(T − 1) is unbiased (Haldane 1945; Mendo and Hernando 2006)`;
    rows.push(rateRow('FER, stopped on errors', estimate, note));
  }
  return rows;
}

function undetectedRow({ tally, level }: Point): EstimatorRow {
  const { undetected, frames } = tally;
  const note = `${counted(undetected, 'frame')} decoded to another codeword; ${levelText(level)} Clopper–Pearson`;
  const rate =
    undetected === 0
      ? { value: null, lower: 0, upper: zeroErrorUpperLimit(frames, level) }
      : { value: undetected / frames, ...binomialInterval(undetected, frames, level) };
  return rateRow('Undetected', rate, note);
}

function rateRow(label: string, rate: Estimate, method: string): EstimatorRow {
  const note = rate.value === null ? method : `${intervalText(rate)}, ${method}`;
  return { label, text: rateText(rate, 3), grade: 'sampled', note };
}

function iterationRow({ tally }: Point): EstimatorRow {
  const { mean, median, p99, p999, largest } = summariseIterations(tally.iterationHistogram);
  return {
    label: 'Iterations a frame',
    text: `${mean.toFixed(2)} on average`,
    grade: 'sampled',
    note: `half of the frames within ${median}, 99 % within ${p99}, 99.9 % within ${p999}, at most ${largest}`,
  };
}

function costRow({ tally, decoder, n }: Point, ones: number): EstimatorRow {
  const perFrame =
    n * edgeVisitsPerBit({ cols: n, colIndex: { length: ones } }, decoder, tally.iterations / tally.frames);
  return {
    label: 'Edge updates a frame',
    text: countText(perFrame),
    grade: 'sampled',
    note: `${countText(perFrame * tally.frames)} in all, the same on every machine; one is ${decoderCard(decoder.kind).visit}`,
  };
}

const countText = (count: number): string => (count < 1e6 ? wholeNumber(Math.round(count)) : scientific(count, 3));

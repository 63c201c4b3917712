import { normalTail } from '../../bounds/normal-tail.ts';
import { type CheckRule, minSumRule, sumProductRule } from './check-nodes.ts';
import type { EdgeDegrees } from './edge-degrees.ts';
import { type Density, emptyDensity, errorProbability, throughBits } from './message-density.ts';

/** Levels on each side of zero; a log-likelihood ratio of 25 is the last. Against published thresholds this
 *  errs by less than 6e-4 relative, upwards. */
const LEVELS = 250;
const LAST = 25;
const MOST_ITERATIONS = 800;
/** Mass moved in one iteration below which the densities count as at rest. */
const AT_REST = 3e-6;

/** Largest crossover probability of the BSC that the decoder corrects on cycle-free graphs, by quantised density evolution
 *  (Richardson and Urbanke 2001; Chung and others 2001). Right to about 6e-4 relative, not a bound. */
export function bscSoftThreshold(degrees: EdgeDegrees, decoder: 'sum-product' | 'min-sum'): number {
  return bisect(0, 0.5, (p) => {
    const ratio = Math.log1p(-p) - Math.log(p);
    // The grid is laid so that the channel's two values lie on it. Min-sum does not care for the scale.
    const place = decoder === 'min-sum' ? 1 : Math.max(1, Math.round((ratio * LEVELS) / LAST));
    const channel = emptyDensity(LEVELS);
    channel.mass[LEVELS + place] = 1 - p;
    channel.mass[LEVELS - place] = p;
    return evolves(degrees, channel, decoder === 'min-sum' ? minSumRule : sumProductRule(LEVELS, ratio / place));
  });
}

/** Largest noise deviation of BPSK with unit symbols that the decoder corrects on cycle-free graphs. */
export function awgnSoftThreshold(degrees: EdgeDegrees, decoder: 'sum-product' | 'min-sum'): number {
  const step = LAST / LEVELS;
  const rule = decoder === 'min-sum' ? minSumRule : sumProductRule(LEVELS, step);
  return bisect(0.2, 4, (sigma) => evolves(degrees, gaussianChannel(sigma, step), rule));
}

/** Ratios of mean 2/σ² and variance 4/σ², by the mass of each cell of the grid. */
function gaussianChannel(sigma: number, step: number): Density {
  const channel = emptyDensity(LEVELS);
  const above = (place: number) => normalTail((place * step - 2 / sigma ** 2) / (2 / sigma));
  for (let i = -LEVELS; i <= LEVELS; i++) {
    const from = i === -LEVELS ? 1 : above(i - 0.5);
    const to = i === LEVELS ? 0 : above(i + 0.5);
    channel.mass[LEVELS + i] = from - to;
  }
  return channel;
}

/** Whether errors die out: below 1e-6 within the iterations allowed, or the densities at rest before. The error rate
 *  itself may pause while the densities move. */
function evolves({ columns, rows }: EdgeDegrees, channel: Density, rule: CheckRule): boolean {
  let message = channel;
  for (let i = 0; i < MOST_ITERATIONS; i++) {
    const next = throughBits(channel, rule(message, rows), columns);
    if (errorProbability(next) < 1e-6) return true;
    if (movedMass(message, next) < AT_REST) return false;
    message = next;
  }
  return false;
}

function movedMass(a: Density, b: Density): number {
  let sum = 0;
  for (let i = 0; i < a.mass.length; i++) sum += Math.abs(a.mass[i]! - b.mass[i]!);
  return sum;
}

function bisect(low: number, high: number, good: (x: number) => boolean): number {
  let [a, b] = [low, high];
  while (b - a > 1e-4 * b) {
    const middle = (a + b) / 2;
    if (good(middle)) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}

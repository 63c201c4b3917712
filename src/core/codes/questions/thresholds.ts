import { type ThresholdQuestion, thresholdOfMatrix } from '../density-evolution/threshold.ts';
import type { CodeQuestion } from './question.ts';

const asked: readonly (ThresholdQuestion & { label: string })[] = [
  { channel: 'bsc', decoder: 'gallager-a', label: 'Threshold p, Gallager A' },
  { channel: 'bsc', decoder: 'gallager-b', label: 'Threshold p, Gallager B' },
  { channel: 'bsc', decoder: 'sum-product', label: 'Threshold p, sum-product' },
  { channel: 'bsc', decoder: 'min-sum', label: 'Threshold p, min-sum' },
  { channel: 'bec', decoder: 'peeling', label: 'Threshold, erasures' },
  { channel: 'awgn', decoder: 'sum-product', label: 'Threshold σ, sum-product on AWGN' },
  { channel: 'awgn', decoder: 'min-sum', label: 'Threshold σ, min-sum on AWGN' },
];

/** The worst channel that codes with these weights correct when they are long and without short cycles. Of this very code
 *  it says nothing certain. */
export const thresholds: CodeQuestion = {
  answer({ H }, { onProgress }) {
    const lines = asked.map(({ label, ...question }, i) => {
      const value = thresholdOfMatrix(H, question);
      onProgress?.((i + 1) / asked.length);
      return {
        key: `threshold-${question.channel}-${question.decoder}`,
        label,
        text: value.toPrecision(4),
        number: value,
        grade: 'computed' as const,
        method: 'density evolution of the ensemble with these row and column weights; no statement on this code',
        source:
          'T. J. Richardson, R. L. Urbanke 2001, The capacity of low-density parity-check codes under message-passing decoding',
      };
    });
    return { lines };
  },
};

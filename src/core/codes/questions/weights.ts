import { weightDistribution } from '../analysis/distance/weight-distribution.ts';
import type { CodeQuestion } from './question.ts';

/** How many codewords have each weight. */
export const weights: CodeQuestion = {
  answer({ H }) {
    const { counts, method } = weightDistribution(H);
    const rows = [...counts];
    const least = rows.find(([weight]) => weight > 0);
    const line = (key: string, label: string, text: string, number?: number) => ({
      key,
      label,
      text,
      ...(number !== undefined && { number }),
      grade: 'computed' as const,
      method,
    });
    return {
      lines: least
        ? [
            line('distance', 'Minimum distance', String(least[0]), least[0]),
            line('lightest', `Words of weight ${least[0]}`, String(least[1])),
          ]
        : [line('distance', 'Minimum distance', 'none: no word but zero')],
      list: {
        fileName: 'weight-distribution.csv',
        text: `weight,codewords\n${rows.map(([weight, count]) => `${weight},${count}\n`).join('')}`,
      },
    };
  },
};

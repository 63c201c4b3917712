import { Bar, BarChart, ResponsiveContainer, XAxis, YAxis } from 'recharts';
import { wholeNumber } from '@/components/ui/numbers.ts';

export type Weights = readonly (readonly [weight: number, count: number])[];

const TEXT = { fill: 'var(--quiet)', fontSize: 12 };

/** How many rows, or columns, have each weight. */
export default function WeightBars({ weights, of, axis }: { weights: Weights; of: 'row' | 'column'; axis?: string }) {
  const most = Math.max(1, ...weights.map(([, count]) => count));
  const data = weights.map(([weight, count]) => ({ weight: String(weight), count }));
  return (
    <ResponsiveContainer width="100%" height={132}>
      <BarChart data={data} margin={{ top: 8, right: 8, bottom: 18, left: 0 }} accessibilityLayer={false}>
        <XAxis
          dataKey="weight"
          tick={TEXT}
          stroke="var(--quiet)"
          label={{ value: axis ?? `${of} weight`, position: 'bottom', offset: 2, ...TEXT }}
        />
        <YAxis
          domain={[0, most]}
          ticks={[0, most]}
          tickFormatter={wholeNumber}
          tick={TEXT}
          stroke="var(--quiet)"
          width={52}
        />
        <Bar dataKey="count" fill="var(--quiet)" maxBarSize={44} isAnimationActive={false} />
      </BarChart>
    </ResponsiveContainer>
  );
}

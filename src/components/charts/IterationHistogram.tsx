import { Bar, BarChart, CartesianGrid, Tooltip, XAxis, YAxis } from 'recharts';
import { counted, superscript, wholeNumber } from '@/components/ui/numbers.ts';
import { histogramBars, histogramSentence } from './histogram-bars.ts';

export interface IterationHistogramProps {
  /** Entry i counts frames that ended after i iterations. */
  histogram: readonly number[];
}

/** Frames by iterations done, on a logarithmic axis, so that the few frames at the cap are seen beside the many that
 *  end early. */
export function IterationHistogram({ histogram }: IterationHistogramProps) {
  const bars = histogramBars(histogram);
  const decades = Math.max(1, Math.ceil(Math.log10(Math.max(...bars.map((bar) => bar.frames ?? 1)))));
  const ticks = Array.from({ length: decades + 1 }, (_, e) => 10 ** e);
  return (
    <figure>
      <p className="sr-only">{histogramSentence(histogram)}</p>
      <div aria-hidden="true" className="h-52 w-full text-tiny">
        <BarChart
          responsive
          data={bars}
          style={{ width: '100%', height: '100%' }}
          margin={{ top: 8, right: 4, bottom: 18, left: 0 }}
          barCategoryGap={bars.length > 40 ? 0 : 2}
          accessibilityLayer={false}
        >
          <CartesianGrid vertical={false} stroke="var(--hair)" />
          <XAxis
            dataKey="label"
            tick={{ fill: 'var(--quiet)', fontSize: 12 }}
            stroke="var(--quiet)"
            label={{ value: 'iterations', position: 'insideBottom', offset: -12, fill: 'var(--ink)', fontSize: 12 }}
          />
          <YAxis
            scale="log"
            domain={[0.6, 10 ** decades]}
            ticks={ticks}
            allowDataOverflow
            width={36}
            tick={{ fill: 'var(--quiet)', fontSize: 12 }}
            stroke="var(--quiet)"
            tickFormatter={(value: number) => (value === 1 ? '1' : `10${superscript(Math.round(Math.log10(value)))}`)}
          />
          <Tooltip
            cursor={{ fill: 'var(--tint)' }}
            contentStyle={{ background: 'var(--sheet)', border: '1px solid var(--ink)', padding: '4px 8px' }}
            labelFormatter={(label) => `${String(label)} iterations`}
            formatter={(value) => [wholeNumber(Number(value)), 'frames']}
          />
          <Bar dataKey="frames" fill="var(--curve-1)" isAnimationActive={false} />
        </BarChart>
      </div>
      <figcaption className="text-quiet text-tiny">
        {counted(
          histogram.reduce((sum, frames) => sum + frames, 0),
          'frame',
        )}
        , logarithmic
      </figcaption>
    </figure>
  );
}

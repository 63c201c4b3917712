import { counted } from '@/components/ui/numbers.ts';
import { parameterText, rateText } from '../rate-text.ts';
import type { ChartModel } from './chart-model.ts';

/** The chart in words, for its description: what each curve does from its first to its last point. */
export function describeChart({ placed, kind, requirement }: ChartModel): string {
  const name = kind === 'fer' ? 'Frame error rate' : 'Bit error rate';
  const sentences = [`${name} against the crossover probability p, both axes logarithmic, p falling to the right.`];
  for (const { label, curve, style } of placed.map(({ chartCurve }) => chartCurve)) {
    const first = curve.points[0];
    const last = curve.points.at(-1);
    if (!first || !last) {
      sentences.push(`${label}: no frames yet.`);
      continue;
    }
    const at = (point: typeof first) => `${rateText(point[kind])} at p = ${parameterText(point.p)}`;
    const course = first === last ? at(first) : `from ${at(first)} to ${at(last)}`;
    sentences.push(`${label} (${style.pattern}): ${counted(curve.points.length, 'point')}, ${course}.`);
  }
  if (requirement) sentences.push(`${requirement.label}.`);
  return sentences.join(' ');
}

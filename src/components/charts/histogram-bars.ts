import { counted } from '@/components/ui/numbers.ts';

export interface HistogramBar {
  /** "3", or "30–34" where several counts share a bar. */
  label: string;
  /** null where there are none: a logarithmic axis has no place for 0. */
  frames: number | null;
}

const MOST_BARS = 60;

/** Bars of a histogram over iterations, neighbours joined so that there are at most sixty. */
export function histogramBars(histogram: readonly number[]): HistogramBar[] {
  const size = Math.max(1, Math.ceil(histogram.length / MOST_BARS));
  const bars: HistogramBar[] = [];
  for (let from = 0; from < histogram.length; from += size) {
    const to = Math.min(histogram.length, from + size) - 1;
    const frames = histogram.slice(from, to + 1).reduce((sum, count) => sum + count, 0);
    bars.push({ label: from === to ? String(from) : `${from}–${to}`, frames: frames === 0 ? null : frames });
  }
  return bars;
}

/** The histogram in a sentence: where half of the frames have ended, and how many took the most. */
export function histogramSentence(histogram: readonly number[]): string {
  const total = histogram.reduce((sum, count) => sum + count, 0);
  if (total === 0) return 'No frames yet.';
  let seen = 0;
  const median = histogram.findIndex((count) => {
    seen += count;
    return seen * 2 >= total;
  });
  const last = histogram.length - 1;
  return `Of ${counted(total, 'frame')}, half ended within ${counted(median, 'iteration')}; ${counted(histogram[last]!, 'frame')} took ${last}.`;
}

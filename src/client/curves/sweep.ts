/** Channel points of a sweep from one crossover probability to another, both included, evenly spaced on the
 *  logarithmic axis, each rounded to four significant digits so that it can be typed again. Worst channel first. */
export function logSweep(from: number, to: number, count: number): number[] {
  if (count === 1) return [from];
  const step = Math.log(to / from) / (count - 1);
  const points = Array.from({ length: count }, (_, i) => {
    if (i === 0) return from;
    return i === count - 1 ? to : Number((from * Math.exp(i * step)).toPrecision(4));
  });
  return tidy(points);
}

/** Numbers of a list typed with spaces, semicolons, line breaks or commas between; what is no number is told back. */
export function parseList(text: string): { values: number[]; refused: string[] } {
  const words = text.split(/[\s;,]+/).filter((word) => word !== '');
  const refused = words.filter((word) => !Number.isFinite(Number(word)));
  const values = words.map(Number).filter((value) => Number.isFinite(value));
  return { values: tidy(values), refused };
}

const tidy = (values: readonly number[]): number[] => [...new Set(values)].sort((a, b) => b - a);

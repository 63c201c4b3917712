import type { Property } from '../properties.ts';

export interface Merged {
  lines: Property[];
  /** Keys of the lines that are new or say more than before. */
  improved: string[];
}

/** What is known of a code after a further analysis: each line as it was, or narrower, or new. Never worse: an exact value
 *  stays, a proof stays before a computation, and of two enclosures the part common to both is kept. */
export function mergeLines(known: readonly Property[], found: readonly Property[]): Merged {
  const lines = [...known];
  const improved: string[] = [];
  for (const line of found) {
    const at = lines.findIndex(({ key }) => key === line.key);
    const merged = at < 0 ? line : better(lines[at]!, line);
    if (!merged) continue;
    if (at < 0) lines.push(merged);
    else lines[at] = merged;
    improved.push(line.key);
  }
  return { lines, improved };
}

/** The better of two lines on one property, or both together; null when the new one adds nothing. */
function better(known: Property, found: Property): Property | null {
  const isExact = ({ grade }: Property) => grade === 'proved' || grade === 'computed';
  if (isExact(known)) return null;
  if (isExact(found)) return found;
  const [a, b] = [endsOf(known), endsOf(found)];
  if (b.lower <= a.lower && b.upper >= a.upper) return null;
  if (b.lower >= a.lower && b.upper <= a.upper) return found;
  const below = a.lower > b.lower ? known : found;
  const above = a.upper < b.upper ? known : found;
  return together(below, above);
}

interface Ends {
  lower: number;
  upper: number;
}

/** Lower and upper value of a bounded line, as its number and its text say them. */
function endsOf({ number = Number.NEGATIVE_INFINITY, text }: Property): Ends {
  const upper = /\bto (\d[\d\s]*)$/u.exec(text)?.[1]?.replace(/\s/gu, '');
  return { lower: number, upper: upper ? Number(upper) : Number.POSITIVE_INFINITY };
}

/** The lower value of one line and the upper of the other, each with its method. */
function together(below: Property, above: Property): Property {
  const [lower, upper] = [endsOf(below).lower, endsOf(above).upper];
  const isExact = lower === upper;
  const lowerText = below.text.replace(/ to .+$/u, '');
  const upperText = / to (.+)$/u.exec(above.text)?.[1] ?? String(upper);
  return {
    ...below,
    text: isExact ? lowerText : `${lowerText} to ${upperText}`,
    grade: isExact ? 'computed' : 'bounded',
    method: `below: ${methodOf(below, 'below')}; above: ${methodOf(above, 'above')}`,
    elapsedMs: (below.elapsedMs ?? 0) + (above.elapsedMs ?? 0) || undefined,
  };
}

const methodOf = ({ method }: Property, side: 'below' | 'above'): string =>
  new RegExp(`${side}: (.*?)(?:; (?:below|above): |$)`, 'u').exec(method)?.[1] ?? method;

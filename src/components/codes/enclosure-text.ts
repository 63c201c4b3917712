import { scientific, wholeNumber } from '@/components/ui/numbers.ts';
import type { Enclosure } from '@/core/evidence.ts';

const written = (value: number) => (Number.isInteger(value) ? wholeNumber(value) : scientific(value));

/** "18" when both ends meet, "4 to 8" between, "≥ 4" without an upper end. */
export function enclosureText({ lower, upper }: Enclosure): string {
  if (lower === upper) return written(lower);
  return Number.isFinite(upper) ? `${written(lower)} to ${written(upper)}` : `≥ ${written(lower)}`;
}

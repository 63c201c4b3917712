import type { Enclosure } from '../evidence.ts';

/** How a rate stands to a target: met when even the upper limit is within it, above when even the lower limit passes it. */
export function rateVerdict({ lower, upper }: Enclosure, target: number): 'met' | 'above' | 'undecided' {
  if (upper <= target) return 'met';
  return lower > target ? 'above' : 'undecided';
}

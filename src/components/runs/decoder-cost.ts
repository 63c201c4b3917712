import { wholeNumber } from '@/components/ui/numbers.ts';
import { decoderCard } from '@/core/decoders/catalogue.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

interface CostedCode {
  n: number;
  /** Edges of the Tanner graph. */
  ones: number;
}

/** What an iteration costs a code bit, the syndrome test included, the same on every machine: in visits to each of the
 *  bit's checks, and in all for the codes at hand. */
export function decoderCost(kind: DecoderSpec['kind'], codes: readonly CostedCode[]): string {
  const { edgeVisitsPerIteration, visit } = decoderCard(kind);
  const visits = edgeVisitsPerIteration + 1;
  const perBit = [...new Set(codes.map(({ n, ones }) => wholeNumber(Math.round((visits * ones) / n))))];
  const here = perBit.length === 0 ? '' : `, so ${perBit.join(' or ')} for the codes chosen`;
  return `A bit and iteration cost ${visits} edge updates for each of the bit’s checks${here}; one is ${visit}.`;
}

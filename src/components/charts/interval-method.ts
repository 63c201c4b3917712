import type { RateKind } from '@/client/curves/curve.ts';

/** How the intervals on the charts were computed, as said beside them. */
export const INTERVAL_METHOD: Record<RateKind, string> = {
  fer: 'Clopper–Pearson',
  ber: 'by the spread over frames',
};

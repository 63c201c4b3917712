import type { Estimate } from '@/client/curves/curve.ts';
import { Figure } from './Figure.tsx';
import { intervalText, rateText } from './rate-text.ts';

/** A rate of a table, its limits in small beneath; a rate without errors is a limit itself. */
export function RateWithLimits({ rate }: { rate: Estimate }) {
  return (
    <span className="inline-grid">
      <Figure text={rateText(rate)} />
      {rate.value !== null && (
        <span className="text-quiet">
          <Figure text={intervalText(rate)} />
        </span>
      )}
    </span>
  );
}

import { lazy, type RefObject, Suspense, useEffect, useRef, useState } from 'react';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import type { Weights } from './WeightBars.tsx';

const WeightBars = lazy(() => import('./WeightBars.tsx'));

interface Props {
  rowWeights: Weights;
  columnWeights: Weights;
}

/** Row and column weights in words and, where there is more than one, as bars; the drawing library is fetched only once
 *  they are in view, and for a regular matrix, whose single bar would say nothing more, not at all. */
export default function WeightCharts({ rowWeights, columnWeights }: Props) {
  return (
    <div className="grid gap-6 sm:grid-cols-2">
      <Weight of="row" weights={rowWeights} />
      <Weight of="column" weights={columnWeights} />
    </div>
  );
}

function Weight({ of, weights }: { of: 'row' | 'column'; weights: Weights }) {
  const place = useRef<HTMLDivElement>(null);
  const seen = useSeen(place);
  return (
    <figure className="min-w-0">
      <figcaption className="text-tiny">{weightText(weights, of)}</figcaption>
      {weights.length > 1 && (
        <div ref={place} className="mt-1 h-33" aria-hidden="true">
          {seen && (
            <Suspense fallback={null}>
              <WeightBars of={of} weights={weights} />
            </Suspense>
          )}
        </div>
      )}
    </figure>
  );
}

/** Whether the element has been on the screen yet. */
function useSeen(place: RefObject<Element | null>): boolean {
  const [seen, setSeen] = useState(false);
  useEffect(() => {
    if (!place.current) return;
    const watcher = new IntersectionObserver((entries) => {
      if (!entries.some((entry) => entry.isIntersecting)) return;
      setSeen(true);
      watcher.disconnect();
    });
    watcher.observe(place.current);
    return () => watcher.disconnect();
  }, [place]);
  return seen;
}

/** "Every row has weight 17 (273 rows)" or "Rows: 12 of weight 3, 40 of weight 4". */
export function weightText(weights: Weights, of: 'row' | 'column'): string {
  if (weights.length === 0) return `No ${of}s.`;
  const [[weight, count]] = weights as [readonly [number, number]];
  if (weights.length === 1) return `Every ${of} has weight ${wholeNumber(weight)} (${counted(count, of)}).`;
  const shown = weights.slice(0, 6).map(([w, c]) => `${wholeNumber(c)} of weight ${wholeNumber(w)}`);
  const rest = weights.length > 6 ? ` and ${counted(weights.length - 6, 'other weight')}` : '';
  return `${of === 'row' ? 'Rows' : 'Columns'}: ${shown.join(', ')}${rest}.`;
}

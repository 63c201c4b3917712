import { lazy, Suspense, useEffect, useRef, useState } from 'react';
import type { IterationHistogramProps } from './IterationHistogram.tsx';

const IterationHistogram = lazy(() =>
  import('./IterationHistogram.tsx').then((module) => ({ default: module.IterationHistogram })),
);

/** The histogram with its charting library, fetched only once the place for it comes into view. */
export function HistogramWhenVisible(props: IterationHistogramProps) {
  const place = useRef<HTMLDivElement>(null);
  const [isSeen, setIsSeen] = useState(false);
  useEffect(() => {
    const node = place.current;
    if (!node || typeof IntersectionObserver === 'undefined') return;
    const observer = new IntersectionObserver(([entry]) => entry?.isIntersecting && setIsSeen(true), {
      rootMargin: '160px',
    });
    observer.observe(node);
    return () => observer.disconnect();
  }, []);
  const waiting = <p className="text-quiet text-tiny">The histogram is being drawn.</p>;
  return (
    <div ref={place} className="min-h-52">
      {isSeen ? (
        <Suspense fallback={waiting}>
          <IterationHistogram {...props} />
        </Suspense>
      ) : (
        waiting
      )}
    </div>
  );
}

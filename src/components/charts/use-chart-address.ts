import { useMemo } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import type { ChartCurve } from './chart-curve.ts';
import { type ChartWindow, parseWindow, windowText } from './error-rate-chart/domain.ts';
import { useUrlParam } from './url-state.ts';

/** Rate, zoom and hidden curves of a chart, kept in the address: `rate=ber`, `zoom=…`, `hide=B.D` by letter. */
export function useChartAddress(curves: readonly ChartCurve[]) {
  const [rate, setRate] = useUrlParam('rate');
  const [zoomText, setZoomText] = useUrlParam('zoom');
  const [hide, setHide] = useUrlParam('hide');
  const zoom = useMemo(() => parseWindow(zoomText), [zoomText]);
  const hidden = useMemo(() => {
    const letters = new Set((hide ?? '').split('.'));
    return new Set(curves.filter(({ style }) => letters.has(style.letter)).map(({ curve }) => curve.key));
  }, [hide, curves]);

  return {
    kind: (rate === 'ber' ? 'ber' : 'fer') as RateKind,
    zoom,
    hidden,
    onKind(kind: RateKind) {
      setRate(kind === 'ber' ? 'ber' : null);
      setZoomText(null);
    },
    onZoom: (window: ChartWindow | null) => setZoomText(window && windowText(window)),
    onToggle(key: string) {
      const letters = curves
        .filter(({ curve }) => (curve.key === key ? !hidden.has(key) : hidden.has(curve.key)))
        .map(({ style }) => style.letter);
      setHide(letters.length > 0 ? letters.join('.') : null);
    },
  };
}

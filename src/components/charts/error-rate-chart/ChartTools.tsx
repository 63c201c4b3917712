import type { RateKind } from '@/client/curves/curve.ts';
import { Button } from '@/components/ui/Button.tsx';
import { RateSwitch } from '../RateSwitch.tsx';
import type { ChartWindow } from './domain.ts';
import { ZOOM_STEP } from './use-chart-keys.ts';

interface Props {
  kind: RateKind;
  onKind: (kind: RateKind) => void;
  zoom: ChartWindow | null;
  onZoom: (zoom: ChartWindow | null) => void;
  onMagnify: (factor: number) => void;
}

/** What stands above the drawing and is not printed. */
export function ChartTools({ kind, onKind, zoom, onZoom, onMagnify }: Props) {
  return (
    <div className="mb-1 flex flex-wrap items-center justify-between gap-2" data-screen-only>
      <RateSwitch kind={kind} onKind={onKind} />
      <div className="flex flex-wrap gap-1">
        <Button kind="quiet" size="small" onClick={() => onMagnify(ZOOM_STEP)}>
          Zoom in
        </Button>
        <Button kind="quiet" size="small" onClick={() => onMagnify(1 / ZOOM_STEP)}>
          Zoom out
        </Button>
        <Button kind="quiet" size="small" disabled={zoom === null} onClick={() => onZoom(null)}>
          Whole chart
        </Button>
      </div>
    </div>
  );
}

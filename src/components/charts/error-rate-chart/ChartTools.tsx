import { useState } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import { Button } from '@/components/ui/Button.tsx';
import type { ChartFile } from '../export/keep-chart.ts';
import { RateSwitch } from '../RateSwitch.tsx';
import type { ChartWindow } from './domain.ts';
import { ZOOM_STEP } from './use-chart-keys.ts';

interface Props {
  kind: RateKind;
  onKind: (kind: RateKind) => void;
  zoom: ChartWindow | null;
  onZoom: (zoom: ChartWindow | null) => void;
  onMagnify: (factor: number) => void;
  onKeep: (file: ChartFile) => Promise<void>;
}

/** What stands above the drawing and is not printed. */
export function ChartTools({ kind, onKind, zoom, onZoom, onMagnify, onKeep }: Props) {
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
        <KeepButton file="svg" onKeep={onKeep} />
        <KeepButton file="png" onKeep={onKeep} />
      </div>
    </div>
  );
}

function KeepButton({ file, onKeep }: { file: ChartFile; onKeep: Props['onKeep'] }) {
  const [state, setState] = useState<'idle' | 'busy' | 'failed'>('idle');
  const keep = async () => {
    setState('busy');
    try {
      await onKeep(file);
      setState('idle');
    } catch {
      setState('failed');
    }
  };
  const name = file.toUpperCase();
  return (
    <Button
      kind="quiet"
      size="small"
      busy={state === 'busy'}
      onClick={keep}
      aria-label={`Download the chart as ${name}`}
    >
      {state === 'failed' ? `${name} failed, try again` : name}
    </Button>
  );
}

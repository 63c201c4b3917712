import { useCallback, useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { Legend } from './Legend.tsx';
import { openPlot, type Plot, type PlotState } from './plot.ts';
import { readoutText, visibleText } from './readout.ts';
import { useGroundChange } from './use-ground-change.ts';

interface Props {
  H: SparseMatrix;
  /** What is drawn, for those who cannot see it. */
  name?: string;
  /** Where to begin, as an earlier view's text. */
  start?: string | null;
  /** Told the view as text after each change; null for the whole matrix. */
  onView?: (text: string | null) => void;
}

/** A matrix of ones and zeros from the whole down to single cells. */
export function MatrixPlot({ H, name = 'Parity-check matrix', start, onView }: Props) {
  const surface = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const plot = useRef<Plot | null>(null);
  const first = useRef(start);
  const [state, setState] = useState<PlotState | null>(null);
  useGroundChange(useCallback(() => plot.current?.recolour(), []));

  useEffect(() => {
    if (!canvas.current || !surface.current) return;
    const opened = openPlot(canvas.current, surface.current, H, { start: first.current, onState: setState });
    first.current = null;
    plot.current = opened;
    if (!opened) return;
    const box = surface.current;
    const fill = () => opened.resize(box.clientWidth, box.clientHeight, window.devicePixelRatio || 1);
    const watcher = new ResizeObserver(fill);
    watcher.observe(box);
    fill();
    return () => {
      watcher.disconnect();
      opened.close();
    };
  }, [H]);

  const viewText = state ? (state.whole ? null : state.viewText) : undefined;
  useEffect(() => {
    if (viewText === undefined) return;
    const later = setTimeout(() => onView?.(viewText), 250);
    return () => clearTimeout(later);
  }, [viewText, onView]);

  return (
    <figure>
      <Tools plot={plot} whole={state?.whole ?? true} />
      <div
        ref={surface}
        role="application"
        aria-roledescription="zoomable plot"
        aria-label={`${name}, ${wholeNumber(H.rows)} rows by ${wholeNumber(H.cols)} columns. Arrow keys move, plus and minus zoom, 0 shows the whole.`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the plot is moved and zoomed by keyboard
        tabIndex={0}
        className="relative w-full cursor-crosshair overflow-hidden border border-rule bg-sheet"
        style={{
          aspectRatio: `${Math.min(4, Math.max(0.8, H.cols / H.rows))}`,
          maxHeight: '42rem',
          touchAction: state?.whole === false ? 'none' : 'pan-x pan-y',
        }}
      >
        <canvas ref={canvas} className="absolute inset-0 size-full" data-matrix-canvas />
      </div>
      <figcaption className="mt-1.5 grid gap-1 text-tiny">
        <output className="font-mono" aria-live="polite">
          {readoutText(state?.under ?? null)}
        </output>
        <span className="text-quiet">
          {state && `Shown: ${visibleText(state.visible)}, counted from 0. `}
          {counted(H.colIndex.length, 'one')} in {wholeNumber(H.rows)} × {wholeNumber(H.cols)} cells.
        </span>
        {state && <Legend H={H} scale={state.cellPixels * (globalThis.devicePixelRatio || 1)} />}
      </figcaption>
    </figure>
  );
}

function Tools({ plot, whole }: { plot: React.RefObject<Plot | null>; whole: boolean }) {
  return (
    <div className="mb-2 flex flex-wrap gap-2" data-screen-only>
      <Button size="small" onClick={() => plot.current?.zoom(2)}>
        Zoom in
      </Button>
      <Button size="small" disabled={whole} onClick={() => plot.current?.zoom(0.5)}>
        Zoom out
      </Button>
      <Button size="small" disabled={whole} onClick={() => plot.current?.whole()}>
        Whole matrix
      </Button>
    </div>
  );
}

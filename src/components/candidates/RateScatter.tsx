import { useMemo, useRef, useState } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { endpoints } from '@/api/endpoints.ts';
import { useApi } from '@/client/hooks.ts';
import { useWidth } from '@/components/charts/error-rate-chart/use-width.ts';
import { Button } from '@/components/ui/Button.tsx';
import { counted } from '@/components/ui/numbers.ts';
import type { CatalogueParams } from './filters.ts';
import { ScatterAxes } from './ScatterAxes.tsx';
import { markPath, ScatterMarks } from './ScatterMarks.tsx';
import { scatterScale, windowBetween } from './scatter-scale.ts';
import { rateOf } from './table-columns.tsx';
import type { FilterState } from './use-filters.ts';

interface Props {
  query: CatalogueParams;
  chosen: CandidateRow | null | undefined;
  state: FilterState;
}

type Corner = [x: number, y: number];

/** Least rate against length of everything that matches, a shape a structure; a drag brushes a window of both into the
 *  filter. */
export function RateScatter({ query, chosen, state }: Props) {
  const { sort: _sort, descending: _descending, meetsFirst: _meetsFirst, ...window } = query;
  const map = useApi(endpoints.mapCatalogue, { query: window }, { keepPreviousData: true, revalidateOnFocus: false });
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame, 840);
  const cells = map.data?.cells;
  const scale = useMemo(() => scatterScale(cells ?? [], width, width < 560 ? 220 : 260), [cells, width]);
  const [brush, setBrush] = useState<{ from: Corner; to: Corner } | null>(null);

  const place = (event: React.PointerEvent<SVGSVGElement>): Corner => {
    const box = event.currentTarget.getBoundingClientRect();
    return [event.clientX - box.left, event.clientY - box.top];
  };
  const finish = () => {
    const found = brush && windowBetween(scale, brush.from, brush.to);
    setBrush(null);
    if (found) state.change(found);
  };
  const isNarrowed = Boolean(state.filters.n || state.filters.rate);
  return (
    <figure className="border border-rule bg-sheet" data-screen-only>
      <div ref={frame}>
        <svg
          viewBox={`0 0 ${scale.width} ${scale.height}`}
          width={scale.width}
          height={scale.height}
          className="block max-w-full cursor-crosshair touch-pan-y select-none"
          role="img"
          aria-label={`Least rate against length of ${counted(map.data?.matching ?? 0, 'candidate')}. The fields for length and rate set the same window as a drag.`}
          onPointerDown={(event) => {
            event.currentTarget.setPointerCapture?.(event.pointerId);
            setBrush({ from: place(event), to: place(event) });
          }}
          onPointerMove={(event) => brush && setBrush({ ...brush, to: place(event) })}
          onPointerUp={finish}
          onPointerCancel={() => setBrush(null)}
        >
          <ScatterAxes scale={scale} />
          <ScatterMarks cells={cells ?? []} scale={scale} />
          {chosen && (
            <path
              d={markPath(chosen.structure, scale.x(chosen.n), scale.y(rateOf(chosen).lower), 6)}
              className="fill-act stroke-act"
              data-chosen
            />
          )}
          {brush && <Brush {...brush} />}
        </svg>
      </div>
      <figcaption className="flex flex-wrap items-center gap-x-5 gap-y-1 px-3 pb-2 text-quiet text-tiny">
        <span>○ cyclic</span>
        <span>□ quasi-cyclic</span>
        <span>△ other</span>
        <span>filled where several lie close together</span>
        <span>Drag to narrow length and rate. The rate drawn is the least that formulas grant.</span>
        {isNarrowed && (
          <Button size="small" kind="quiet" onClick={() => state.change({ n: '', rate: '' })}>
            Every length and rate
          </Button>
        )}
      </figcaption>
    </figure>
  );
}

function Brush({ from, to }: { from: Corner; to: Corner }) {
  return (
    <rect
      x={Math.min(from[0], to[0])}
      y={Math.min(from[1], to[1])}
      width={Math.abs(from[0] - to[0])}
      height={Math.abs(from[1] - to[1])}
      className="fill-none stroke-act"
      strokeDasharray="4 3"
    />
  );
}

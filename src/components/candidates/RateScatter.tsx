import { scaleLinear, scaleLog } from 'd3-scale';
import { useRef, useState } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { titleOf } from './candidate-words.ts';
import type { FilterState } from './use-filters.ts';

interface Props {
  rows: readonly CandidateRow[];
  state: FilterState;
}

const width = 960;
const height = 260;
const margin = { top: 12, right: 16, bottom: 40, left: 56 };

/** Rate against length, a shape a structure; a drag brushes a window of both into the filter. */
export function RateScatter({ rows, state }: Props) {
  const svg = useRef<SVGSVGElement>(null);
  const [brush, setBrush] = useState<{ from: [number, number]; to: [number, number] } | null>(null);
  const lengths = rows.map(({ n }) => n);
  const rates = rows.map(rateOf);
  const x = scaleLog()
    .domain(padded(Math.min(...lengths), Math.max(...lengths), 1.05))
    .range([margin.left, width - margin.right]);
  const y = scaleLinear()
    .domain([Math.max(0, Math.min(...rates, 0.98) - 0.02), 1])
    .range([height - margin.bottom, margin.top]);

  const place = (event: React.PointerEvent): [number, number] => {
    const box = svg.current!.getBoundingClientRect();
    return [((event.clientX - box.left) / box.width) * width, ((event.clientY - box.top) / box.height) * height];
  };
  const finish = () => {
    setBrush(null);
    if (!brush) return;
    const [x0, x1] = ordered(brush.from[0], brush.to[0]);
    const [y0, y1] = ordered(brush.from[1], brush.to[1]);
    if (x1 - x0 < 8 || y1 - y0 < 8) return;
    state.change({
      n: `${Math.floor(x.invert(x0))}..${Math.ceil(x.invert(x1))}`,
      rate: `${Math.max(0, y.invert(y1)).toFixed(3)}..${Math.min(1, y.invert(y0)).toFixed(3)}`,
    });
  };
  if (rows.length === 0) return null;
  return (
    <figure className="border border-rule bg-sheet" data-screen-only>
      <svg
        ref={svg}
        viewBox={`0 0 ${width} ${height}`}
        className="block w-full touch-pan-y select-none"
        role="img"
        aria-label={`Rate against length of ${rows.length} candidates; the table lists the same.`}
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          setBrush({ from: place(event), to: place(event) });
        }}
        onPointerMove={(event) => brush && setBrush({ ...brush, to: place(event) })}
        onPointerUp={finish}
        onPointerCancel={() => setBrush(null)}
      >
        <Axes x={x} y={y} />
        {rows.map((row) => (
          <Mark key={row.id} row={row} at={[x(row.n), y(rateOf(row))]} isChosen={row.id === state.chosen} />
        ))}
        {brush && (
          <rect
            x={Math.min(brush.from[0], brush.to[0])}
            y={Math.min(brush.from[1], brush.to[1])}
            width={Math.abs(brush.to[0] - brush.from[0])}
            height={Math.abs(brush.to[1] - brush.from[1])}
            className="fill-none stroke-act"
            strokeDasharray="4 3"
          />
        )}
      </svg>
      <figcaption className="flex flex-wrap gap-x-5 px-3 pb-2 text-quiet text-tiny">
        <span>○ cyclic</span>
        <span>□ quasi-cyclic</span>
        <span>△ other</span>
        <span>Drag to search inside a window of length and rate. The rate drawn is the least that formulas grant.</span>
      </figcaption>
    </figure>
  );
}

const rateOf = ({ n, rank }: CandidateRow) => 1 - rank.upper / n;
const ordered = (a: number, b: number): [number, number] => (a < b ? [a, b] : [b, a]);
const padded = (low: number, high: number, by: number): [number, number] => [Math.max(1, low / by), high * by];

function Axes({ x, y }: { x: ReturnType<typeof scaleLog<number>>; y: ReturnType<typeof scaleLinear<number>> }) {
  return (
    <g className="fill-quiet text-[12px]">
      {y.ticks(5).map((tick) => (
        <g key={tick}>
          <line x1={margin.left} x2={width - margin.right} y1={y(tick)} y2={y(tick)} className="stroke-hair" />
          <text x={margin.left - 8} y={y(tick)} dy="0.35em" textAnchor="end">
            {tick.toFixed(2)}
          </text>
        </g>
      ))}
      {x.ticks(6).map((tick) => {
        const label = x.tickFormat(6, '~s')(tick);
        return (
          label && (
            <text key={tick} x={x(tick)} y={height - margin.bottom + 18} textAnchor="middle">
              {label}
            </text>
          )
        );
      })}
      <text x={width / 2} y={height - 6} textAnchor="middle">
        length n
      </text>
      <text transform={`translate(14 ${height / 2}) rotate(-90)`} textAnchor="middle">
        rate
      </text>
    </g>
  );
}

function Mark({ row, at: [cx, cy], isChosen }: { row: CandidateRow; at: [number, number]; isChosen: boolean }) {
  const size = 4.5;
  const look = isChosen ? 'fill-act stroke-act' : 'fill-sheet stroke-ink';
  return (
    <g className={look} strokeWidth={1.2}>
      <title>{titleOf(row)}</title>
      {row.structure === 'cyclic' && <circle cx={cx} cy={cy} r={size} />}
      {row.structure === 'quasi-cyclic' && <rect x={cx - size} y={cy - size} width={2 * size} height={2 * size} />}
      {row.structure === 'none' && <path d={`M${cx} ${cy - size}L${cx + size} ${cy + size}H${cx - size}Z`} />}
    </g>
  );
}

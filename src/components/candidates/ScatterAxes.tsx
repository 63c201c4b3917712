import { wholeNumber } from '@/components/ui/numbers.ts';
import { margin, type ScatterScale } from './scatter-scale.ts';

/** Least distance between two labels of the length, in pixels. */
const apartPx = 44;

export function ScatterAxes({ scale: { x, y, width, height } }: { scale: ScatterScale }) {
  const lengths = x.ticks(6).filter((_, i, ticks) => i === 0 || ticks.length <= 60);
  let last = Number.NEGATIVE_INFINITY;
  const labelled = lengths.filter((tick) => {
    if (x(tick) - last < apartPx) return false;
    last = x(tick);
    return true;
  });
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
      {labelled.map((tick) => (
        <g key={tick}>
          <line
            x1={x(tick)}
            x2={x(tick)}
            y1={height - margin.bottom}
            y2={height - margin.bottom + 4}
            className="stroke-rule"
          />
          <text x={x(tick)} y={height - margin.bottom + 18} textAnchor="middle">
            {wholeNumber(tick)}
          </text>
        </g>
      ))}
      <text x={width / 2} y={height - 5} textAnchor="middle">
        length n
      </text>
      <text transform={`translate(13 ${height / 2}) rotate(-90)`} textAnchor="middle">
        rate
      </text>
    </g>
  );
}

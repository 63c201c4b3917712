import type { RateKind } from '@/client/curves/curve.ts';
import { MINUS } from '@/components/ui/numbers.ts';
import { decimalParts, parameterText } from '../rate-text.ts';
import type { ChartWindow } from './domain.ts';
import type { Frame } from './frame.ts';
import { channelTicks, rateTicks } from './ticks.ts';

interface Props {
  frame: Frame;
  window: ChartWindow;
  kind: RateKind;
}

const RATE_NAME: Record<RateKind, string> = { fer: 'frame error rate', ber: 'bit error rate' };

/** Grid, ticks and axis names. Decades and labelled channel points are ruled across; minor ticks stay at the edge. */
export function Axes({ frame, window, kind }: Props) {
  const { left, right, top, bottom, height, isNarrow } = frame;
  const rates = rateTicks(window.top, window.bottom, frame.y, 15);
  const channel = channelTicks(window.pMax, window.pMin, frame.x, isNarrow ? 42 : 54);
  return (
    <g className="fill-quiet text-quiet" fontSize={isNarrow ? 11.5 : 12.5}>
      <g stroke="var(--hair)" shapeRendering="crispEdges">
        {rates.major.map((tick) => (
          <line key={tick.value} x1={left} x2={right} y1={tick.at} y2={tick.at} />
        ))}
        {channel
          .filter((tick) => tick.isLabelled)
          .map((tick) => (
            <line key={tick.value} x1={tick.at} x2={tick.at} y1={top} y2={bottom} />
          ))}
      </g>
      <g stroke="var(--quiet)" shapeRendering="crispEdges">
        {rates.minor.map((tick) => (
          <line key={tick.value} x1={left - 4} x2={left} y1={tick.at} y2={tick.at} />
        ))}
        {channel.map((tick) => (
          <line key={tick.value} x1={tick.at} x2={tick.at} y1={bottom} y2={bottom + (tick.isLabelled ? 6 : 3)} />
        ))}
      </g>
      {rates.major
        .filter((tick) => tick.isLabelled)
        .map((tick) => (
          <RateLabel key={tick.value} x={left - 9} y={tick.at} value={tick.value} />
        ))}
      {channel
        .filter((tick) => tick.isLabelled)
        .map((tick) => (
          <text key={tick.value} x={tick.at} y={bottom + 20} textAnchor="middle">
            {parameterText(tick.value)}
          </text>
        ))}
      <g className="fill-ink" fontSize={isNarrow ? 12 : 13}>
        <text x={(left + right) / 2} y={height - 8} textAnchor="middle">
          {isNarrow ? 'crossover probability p (BSC)' : 'crossover probability p, binary symmetric channel'}
        </text>
        {isNarrow ? (
          <text x={4} y={12}>
            {RATE_NAME[kind]}
          </text>
        ) : (
          <text transform={`translate(14 ${(top + bottom) / 2}) rotate(-90)`} textAnchor="middle">
            {RATE_NAME[kind]}
          </text>
        )}
      </g>
    </g>
  );
}

/** 10 with a raised exponent; a mantissa before it only when it is not 1. */
function RateLabel({ x, y, value }: { x: number; y: number; value: number }) {
  const [digits, exponent] = decimalParts(value, 3);
  const mantissa = String(Number(digits));
  return (
    <text x={x} y={y + 4} textAnchor="end">
      {mantissa !== '1' && `${mantissa}\u202f×\u202f`}10
      <tspan dy="-5" fontSize="0.75em">
        {String(exponent).replace('-', MINUS)}
      </tspan>
    </text>
  );
}

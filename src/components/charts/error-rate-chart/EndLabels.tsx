import { curveTextColour } from '../palette.ts';
import type { PlacedCurve } from './chart-model.ts';
import { type Frame, labelWidth } from './frame.ts';
import type { Mark } from './marks.ts';
import { spreadLabels } from './spread-labels.ts';

interface Props {
  frame: Frame;
  placed: readonly PlacedCurve[];
  /** One a placed curve. */
  texts: readonly string[];
}

const LINE_HEIGHT = 16;
const OFFSET = 11;

/** The name of each curve at its last point, moved apart where names would run into each other. */
export function EndLabels({ frame, placed, texts }: Props) {
  const labels = placed.flatMap(({ chartCurve, marks: { end } }, i) =>
    end === null ? [] : [{ ...wantedLabel(end, texts[i]!), chartCurve, end }],
  );
  const heights = spreadLabels(labels, LINE_HEIGHT, frame.top + 6, frame.bottom - 6);
  return (
    <g fontSize={13} fontWeight={600}>
      {labels.map(({ chartCurve, end, x, text }, i) => {
        const y = heights[i]!;
        const colour = curveTextColour(chartCurve.style);
        return (
          <g key={chartCurve.curve.key} style={{ color: colour }} data-end-label>
            {Math.abs(y - end.y) > LINE_HEIGHT * 0.7 && (
              <path d={`M${end.x + 5} ${end.y}L${x - 2} ${y}`} stroke="currentColor" strokeWidth="0.8" fill="none" />
            )}
            <text
              x={x}
              y={y + 4.5}
              fill="currentColor"
              stroke="var(--sheet)"
              strokeWidth="3"
              strokeLinejoin="round"
              paintOrder="stroke"
            >
              {text}
            </text>
          </g>
        );
      })}
    </g>
  );
}

const wantedLabel = (end: Mark, text: string) => ({
  x: end.x + OFFSET,
  y: end.y + (end.isBound ? 8 : 0),
  width: labelWidth(text),
  text,
});

import type { RateKind } from '@/client/curves/curve.ts';
import { uncodedFormula, uncodedLabel, uncodedRate } from '@/client/curves/uncoded.ts';
import type { ChartWindow, Requirement } from './domain.ts';
import type { Frame } from './frame.ts';

/** Room that the words need; the key below the chart says them in any case. */
const WORDS_PX = 84;

/** Shades where nothing was measured: to the right of the last point of all shown curves. */
export function Unmeasured({ frame, last }: { frame: Frame; last: number | null }) {
  if (last === null) return null;
  const x = Math.max(frame.left, frame.x(last));
  const width = frame.right - x;
  if (width <= 0) return null;
  return (
    <g data-unmeasured>
      <rect x={x} y={frame.top} width={width} height={frame.bottom - frame.top} fill="var(--unmeasured)" />
      {width > WORDS_PX && (
        <text
          x={frame.right - 6}
          y={frame.bottom - 8}
          textAnchor="end"
          fontSize={12}
          fontStyle="italic"
          className="fill-quiet"
        >
          not measured
        </text>
      )}
    </g>
  );
}

/** The corner that curves must pass below: target rate up to the stated channel point. */
export function RequirementMark({ frame, requirement }: { frame: Frame; requirement: Requirement }) {
  const y = frame.y(requirement.target);
  const isBelow = y > frame.bottom;
  const x = requirement.p === null ? frame.right : Math.max(frame.left, Math.min(frame.right, frame.x(requirement.p)));
  const label = frame.isNarrow ? requirement.shortLabel : requirement.label;
  const nearFoot = isBelow || y + 22 > frame.bottom;
  return (
    <g data-requirement>
      {!isBelow && y >= frame.top && (
        <path
          d={`M${frame.left} ${y}H${x}${requirement.p === null ? '' : `V${frame.bottom}`}`}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="1.6"
        />
      )}
      <text
        x={frame.left + 8}
        y={isBelow ? frame.bottom - 8 : nearFoot ? y - 7 : y + 16}
        fontSize={frame.isNarrow ? 11.5 : 13}
        fontWeight={600}
        className="fill-ink"
        stroke="var(--sheet)"
        strokeWidth="3"
        paintOrder="stroke"
      >
        {isBelow ? `${label}, below this chart` : label}
      </text>
    </g>
  );
}

interface UncodedProps {
  frame: Frame;
  window: ChartWindow;
  kind: RateKind;
  /** Code lengths whose uncoded frames are drawn. */
  lengths: readonly number[];
}

const SAMPLES = 96;

/** What the channel does without a code, as thin lines with one name. */
export function UncodedLines({ frame, window, kind, lengths }: UncodedProps) {
  if (lengths.length === 0) return null;
  const lowest = frame.y(uncodedRate(kind, window.pMin, Math.min(...lengths)));
  const wanted = lowest + (kind === 'ber' ? -8 : 17);
  const isNamed = lowest >= frame.top - 2 && lowest <= frame.bottom - 10;
  return (
    <g className="fill-quiet" fontSize={12} data-uncoded>
      <title>{uncodedFormula(kind)}</title>
      <path
        d={lengths.map((n) => uncodedPath(frame, window, kind, n)).join('')}
        fill="none"
        stroke="var(--quiet)"
        strokeWidth="1.1"
      />
      {isNamed && (
        <text
          x={frame.right - 6}
          y={Math.max(frame.top + 14, wanted)}
          textAnchor="end"
          stroke="var(--sheet)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {uncodedLabel(kind, lengths)}
        </text>
      )}
    </g>
  );
}

function uncodedPath(frame: Frame, window: ChartWindow, kind: RateKind, n: number): string {
  const ratio = window.pMin / window.pMax;
  const places = Array.from({ length: SAMPLES + 1 }, (_, i) => {
    const p = window.pMax * ratio ** (i / SAMPLES);
    return `${frame.x(p).toFixed(1)} ${frame.y(uncodedRate(kind, p, n)).toFixed(1)}`;
  });
  return `M${places.join('L')}`;
}

import { type CurveStyle, curveColour } from '../palette.ts';
import type { CurveMarks, Mark } from './marks.ts';

interface Props {
  placed: CurveMarks;
  style: CurveStyle;
  activePointId: string | null;
}

/** Beyond so many marks they are drawn small, without feet at the whiskers and halo around the points. */
const DENSE_FROM = 80;

/** One curve: line through measured points, whiskers, points, and arrows hanging from upper limits. */
export function CurveLayer({ placed, style, activePointId }: Props) {
  const { marks, path, band, curve } = placed;
  const isDense = marks.length >= DENSE_FROM;
  const foot = isDense ? 0 : 3;
  return (
    <g style={{ color: curveColour(style) }} data-curve={curve.key} stroke="currentColor" fill="none">
      {band !== '' && <path d={band} fill="currentColor" fillOpacity="0.16" strokeWidth="0.6" data-band />}
      {path !== '' && (
        <path
          d={path}
          strokeWidth="2"
          strokeDasharray={style.dash}
          strokeLinecap={style.dash.startsWith('2 ') ? 'round' : 'butt'}
          strokeLinejoin="round"
        />
      )}
      {band === '' && (
        <path d={marks.map((mark) => whiskerPath(mark, foot)).join('')} strokeWidth="1.2" data-whiskers />
      )}
      {marksToDraw(placed, activePointId).map((mark) => (
        <PointMark
          key={mark.point.pointId}
          mark={mark}
          isDense={isDense}
          isActive={mark.point.pointId === activePointId}
        />
      ))}
    </g>
  );
}

/** Within a band only the point that is looked at is marked. */
const marksToDraw = ({ marks, band }: CurveMarks, activePointId: string | null): readonly Mark[] =>
  band === '' ? marks : marks.filter(({ point }) => point.pointId === activePointId);

function whiskerPath({ whisker, x }: Mark, foot: number): string {
  if (whisker === null) return '';
  const { low, high } = whisker;
  const feet = foot === 0 ? '' : `M${x - foot} ${low}h${2 * foot}M${x - foot} ${high}h${2 * foot}`;
  return `M${x} ${high}V${low}${feet}`;
}

function PointMark({ mark, isActive, isDense }: { mark: Mark; isActive: boolean; isDense: boolean }) {
  const { x, y } = mark;
  const size = isDense ? 0.6 : 1;
  return (
    <>
      {isActive && <circle cx={x} cy={y} r="9" strokeWidth="1.5" stroke="var(--ink)" />}
      {mark.isBound ? (
        <path d={boundPath(x, y)} fill="var(--sheet)" strokeWidth="1.6" strokeLinejoin="round" data-bound />
      ) : (
        <circle
          cx={x}
          cy={y}
          r={size * (mark.isThin ? 3.6 : 4.2)}
          fill={mark.isThin ? 'var(--sheet)' : 'currentColor'}
          stroke={mark.isThin || isDense ? 'currentColor' : 'var(--sheet)'}
          strokeWidth={isDense ? 1 : mark.isThin ? 1.8 : 1.4}
          data-point={mark.isThin ? 'thin' : 'firm'}
        />
      )}
    </>
  );
}

/** A bar at the limit and an open arrow downward from it: the rate lies somewhere below. */
export const boundPath = (x: number, y: number): string =>
  `M${x - 5} ${y}h10M${x} ${y}v9M${x - 4.5} ${y + 9}h9l-4.5 8z`;

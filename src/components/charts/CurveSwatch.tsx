import { type CurveStyle, curveColour } from './palette.ts';

interface Props {
  style: CurveStyle;
  /** Also write the curve's letter. */
  showLetter?: boolean;
}

/** A sample of a curve's line, for legends and table heads. */
export function CurveSwatch({ style, showLetter = false }: Props) {
  return (
    <span className="inline-flex shrink-0 items-center gap-1.5">
      <svg viewBox="0 0 34 10" className="h-2.5 w-8.5" aria-hidden="true" style={{ color: curveColour(style) }}>
        <line x1="0" x2="34" y1="5" y2="5" stroke="currentColor" strokeWidth="2" strokeDasharray={style.dash} />
        <circle cx="17" cy="5" r="3.2" fill="currentColor" stroke="var(--sheet)" />
      </svg>
      {showLetter && <span className="font-semibold">{style.letter}</span>}
    </span>
  );
}

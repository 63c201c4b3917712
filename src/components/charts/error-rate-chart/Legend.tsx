import type { ReactNode } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import { uncodedFormula } from '@/client/curves/uncoded.ts';
import { CurveSwatch } from '../CurveSwatch.tsx';
import type { ChartCurve } from '../chart-curve.ts';
import { boundPath } from './CurveLayer.tsx';

interface Props {
  curves: readonly ChartCurve[];
  hidden: ReadonlySet<string>;
  onToggle: (key: string) => void;
}

/** The curves by name, each a switch that shows or hides it. */
export function Legend({ curves, hidden, onToggle }: Props) {
  return (
    <ul className="flex flex-wrap gap-x-5 gap-y-1" aria-label="Curves; press to show or hide">
      {curves.map(({ curve, label, style }) => (
        <li key={curve.key}>
          <button
            type="button"
            aria-pressed={!hidden.has(curve.key)}
            onClick={() => onToggle(curve.key)}
            className="flex min-h-7 items-center gap-2 text-left text-tiny hover:underline aria-[pressed=false]:text-quiet aria-[pressed=false]:line-through aria-[pressed=false]:opacity-70"
          >
            <CurveSwatch style={style} showLetter />
            {label}
          </button>
        </li>
      ))}
    </ul>
  );
}

/** What the marks and the thin lines mean. */
export function MarkKey({ interval, kind, hasBands }: { interval: string; kind: RateKind; hasBands: boolean }) {
  return (
    <p className="flex flex-wrap gap-x-5 gap-y-1 text-quiet text-tiny">
      <KeyItem text={`interval, ${interval}`}>
        <path d="M9 1v14M6 1h6M6 15h6" strokeWidth="1.2" />
        <circle cx="9" cy="8" r="3.4" fill="currentColor" stroke="none" />
      </KeyItem>
      <KeyItem text="thin: fewer than 100 frame errors">
        <circle cx="9" cy="8" r="3.6" strokeWidth="1.8" />
      </KeyItem>
      <KeyItem text="no error seen: the rate is below the bar">
        <path d={boundPath(9, 0.8)} strokeWidth="1.4" transform="scale(0.9)" />
      </KeyItem>
      {hasBands && (
        <KeyItem text="band: rigorous limits from weight strata, valid at every p at once">
          <path d="M0 3 18 6v7L0 10z" fill="currentColor" fillOpacity="0.16" strokeWidth="0.6" />
          <path d="M0 6.5 18 9.5" strokeWidth="1.6" />
        </KeyItem>
      )}
      <KeyItem text="shaded: not measured">
        <rect x="0.5" y="2.5" width="17" height="11" fill="var(--unmeasured)" stroke="var(--rule)" />
      </KeyItem>
      <KeyItem text={uncodedFormula(kind)}>
        <path d="M0 8h18" strokeWidth="1.1" />
      </KeyItem>
    </p>
  );
}

function KeyItem({ text, children }: { text: string; children: ReactNode }) {
  return (
    <span className="inline-flex items-center gap-1.5">
      <svg viewBox="0 0 18 16" className="h-4 w-4.5 shrink-0" fill="none" stroke="currentColor" aria-hidden="true">
        {children}
      </svg>
      {text}
    </span>
  );
}

import type { CurvePoint, RateKind } from '@/client/curves/curve.ts';
import { isThin } from '@/client/curves/curve.ts';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { CurveSwatch } from '../CurveSwatch.tsx';
import type { ChartCurve } from '../chart-curve.ts';
import { Figure } from '../Figure.tsx';
import { intervalText, levelText, parameterText, rateText } from '../rate-text.ts';
import type { Mark } from './marks.ts';

/** A point in one sentence, for the status line that screen readers hear. */
export function pointSentence(label: string, point: CurvePoint, kind: RateKind): string {
  const errors = counted(point.frameErrors, 'frame error');
  const rate = `${label}: at p = ${parameterText(point.p)}, ${kind.toUpperCase()} ${rateText(point[kind], 3)}`;
  if (point.grade === 'bounded')
    return `${rate}, rigorous ${levelText(point.level)} limits ${intervalText(point[kind])}.`;
  const thin = isThin(point) ? ', thin' : '';
  return `${rate}, ${levelText(point.level)} interval ${intervalText(point[kind])}, ${errors} in ${counted(point.frames, 'frame')}${thin}.`;
}

interface Props {
  chartCurve: ChartCurve;
  mark: Mark;
  kind: RateKind;
  /** Width of the drawing, to turn the box inward near the right edge. */
  width: number;
}

/** The figures of the point under the pointer or the keyboard. */
export function Readout({ chartCurve, mark, kind, width }: Props) {
  const { point, x, y } = mark;
  const turnsLeft = x > width / 2;
  const rate = point[kind];
  return (
    <div
      className="pointer-events-none absolute z-10 w-max max-w-[16rem] border border-ink bg-sheet px-2.5 py-1.5 text-tiny"
      style={{
        left: `${(x / width) * 100}%`,
        top: y,
        transform: `translate(${turnsLeft ? 'calc(-100% - 14px)' : '14px'}, ${y > 140 ? '-100%' : '14px'})`,
      }}
      aria-hidden="true"
      data-readout
    >
      <p className="flex items-center gap-2 font-semibold">
        <CurveSwatch style={chartCurve.style} />
        {chartCurve.label}
      </p>
      <dl className="mt-1 grid grid-cols-[auto_auto] gap-x-3 font-mono">
        <Line label="p" value={parameterText(point.p)} />
        <Line label={kind.toUpperCase()} value={rateText(rate, 3)} />
        <Line label={levelText(point.level)} value={intervalText(rate)} />
        {point.grade !== 'bounded' && (
          <>
            <Line label="frames" value={wholeNumber(point.frames)} />
            <Line label="errors" value={wholeNumber(point.frameErrors)} />
          </>
        )}
      </dl>
      {point.grade === 'bounded' && <p className="mt-1 text-quiet">bounded: rigorous limits from weight strata</p>}
      {isThin(point) && <p className="mt-1 font-semibold text-thin">thin: fewer than 100 frame errors</p>}
    </div>
  );
}

function Line({ label, value }: { label: string; value: string }) {
  return (
    <>
      <dt className="font-sans text-quiet">{label}</dt>
      <dd className="text-right">
        <Figure text={value} />
      </dd>
    </>
  );
}

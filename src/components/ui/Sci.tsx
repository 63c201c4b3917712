import { MINUS, scientificParts } from './numbers.ts';

interface Props {
  value: number;
  /** Significant digits. */
  digits?: number;
  /** Written before the number, as in "< 3.0 × 10⁻⁶" for a point without an error. */
  prefix?: '<' | '≤' | '≥' | '≈';
  unit?: string;
}

/** A number as an engineer writes it: 7.4 × 10⁻⁴, a real minus sign, an exponent that is raised. */
export function Sci({ value, digits = 3, prefix, unit }: Props) {
  const { mantissa, exponent } = scientificParts(value, digits);
  return (
    <span className="whitespace-nowrap font-mono">
      {prefix && `${prefix}\u202f`}
      {mantissa}
      {exponent !== null && (
        <>
          {'\u202f×\u202f10'}
          <sup>{String(exponent).replace('-', MINUS)}</sup>
        </>
      )}
      {unit && `\u202f${unit}`}
    </span>
  );
}

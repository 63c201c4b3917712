import { MINUS } from '@/components/ui/numbers.ts';

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹⁻';

/** A figure in one unbroken line with its exponents raised by the layout: the mono face has no good superscripts. */
export function Figure({ text }: { text: string }) {
  const parts = text.split(new RegExp(`([${RAISED}]+)`));
  return (
    <span className="whitespace-nowrap">
      {parts.map((part, at) =>
        at % 2 === 0 ? (
          part
        ) : (
          // biome-ignore lint/suspicious/noArrayIndexKey: parts of one text have no other identity
          <sup key={at}>{[...part].map((c) => (c === '⁻' ? MINUS : RAISED.indexOf(c))).join('')}</sup>
        ),
      )}
    </span>
  );
}

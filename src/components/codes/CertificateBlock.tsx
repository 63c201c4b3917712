import type { Code } from '@/api/codes.ts';
import { duration, wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';

export type Certificate = NonNullable<Code['certificate']>;

interface Props {
  certificate: Certificate | null;
  showTitle?: boolean;
}

/** What was checked on the blocks themselves, and how. */
export function CertificateBlock({ certificate, showTitle = true }: Props) {
  return <TitleBlock title="Verification certificate" showTitle={showTitle} rows={rowsOf(certificate)} />;
}

function rowsOf(c: Certificate | null): TitleRow[] {
  if (!c) return [{ label: 'Design', value: 'none stated; the matrix stands by itself' }];
  const lines: (TitleRow | false)[] = [
    {
      label: 'Claim',
      value: claimOf(c),
      note: `${wholeNumber(c.b)} blocks of ${wholeNumber(c.k)} points, ${wholeNumber(c.r)} blocks a point`,
    },
    { label: 'Verdict', value: c.holds ? 'holds' : 'does not hold', grade: 'computed', note: c.method },
    c.subsetsCounted !== undefined && { label: 'Subsets counted', value: wholeNumber(c.subsetsCounted) },
    c.elapsedMs !== undefined && { label: 'Time', value: duration(c.elapsedMs) },
  ];
  return lines.filter((line) => line !== false);
}

function claimOf({ t, v, k, lambda }: Certificate): string {
  return t === 1
    ? `1-(${wholeNumber(v)}, ${k}, ${wholeNumber(lambda)}), two points on one block at most`
    : `${t}-(${wholeNumber(v)}, ${k}, ${wholeNumber(lambda)}) design`;
}

import type { CandidateRow } from '@/api/catalogue.ts';
import { enclosureText } from '@/components/codes/enclosure-text.ts';
import { classes } from '@/components/ui/classes.ts';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import { derivationOf, designOf } from './candidate-words.ts';
import { KeepCandidate } from './KeepCandidate.tsx';
import { dimensionOf, rateOf } from './table-columns.tsx';

interface Props {
  projectId: string;
  row: CandidateRow;
  mayKeep: boolean;
}

/** The numbers of one candidate, each with its grade and method, its verdicts, and the way into the project. */
export function CandidatePanel({ projectId, row, mayKeep }: Props) {
  return (
    <div className="grid content-start gap-4">
      <TitleBlock
        title={designOf(row)}
        rows={[{ label: 'Matrix', value: derivationOf(row) }, ...rowsOf(row)]}
        showTitle
      />
      {row.verdicts.length > 0 && <Verdicts row={row} />}
      {mayKeep ? (
        <KeepCandidate projectId={projectId} row={row} />
      ) : (
        <p className="text-quiet text-tiny">An engineer or the owner can keep it in this project.</p>
      )}
    </div>
  );
}

function rowsOf(row: CandidateRow): TitleRow[] {
  const { n, rank, girth, distance, radius, radiusGrade, columnWeight, rowWeight, structure, resolvable, shortenBy } =
    row;
  const shortened = row.transforms.some(({ kind }) => kind === 'shorten');
  return [
    { label: 'Length', value: wholeNumber(n), grade: 'proved' },
    { label: 'Dimension', value: enclosureText(dimensionOf(row)), grade: rank.grade },
    { label: 'Rate', value: rateText(row), grade: rank.grade },
    { label: 'Rank', value: enclosureText(rank), grade: rank.grade, note: rank.method },
    { label: 'Girth', value: enclosureText(girth), grade: girth.grade, note: girth.method },
    { label: 'Distance', value: enclosureText(distance), grade: distance.grade, note: distance.method },
    {
      label: 'One-step radius',
      value: wholeNumber(radius),
      grade: radiusGrade,
      note: 'errors that majority logic on orthogonal checks corrects in one step',
    },
    {
      label: 'Weights',
      value: `rows ${wholeNumber(rowWeight)}, columns ${wholeNumber(columnWeight)}`,
      grade: 'proved',
    },
    {
      label: 'Structure',
      value: structure === 'none' ? 'none by construction' : structure,
      note: resolvable ? 'its design is resolvable' : undefined,
    },
    ...(shortenBy
      ? [
          {
            label: 'Shorten by',
            value: `${enclosureText(shortenBy)} bits`,
            note: shortened
              ? 'information bits dropped to hit what is asked; kept so'
              : 'known once the rank is computed: it is kept whole, and shortened from there',
          },
        ]
      : []),
  ];
}

function rateText(row: CandidateRow): string {
  const { lower, upper } = rateOf(row);
  const [least, most] = [lower.toFixed(3), upper.toFixed(3)];
  return least === most ? least : `${least} to ${most}`;
}

const words = { meets: 'meets', misses: 'misses', unknown: 'open' } as const;

function Verdicts({ row }: { row: CandidateRow }) {
  return (
    <section aria-label="Against requirements">
      <h2 className="mb-1">Against requirements</h2>
      <ul className="grid">
        {row.verdicts.map(({ requirement, outcome, grade, method }) => (
          <li
            key={requirement}
            className="flex flex-wrap items-baseline justify-between gap-x-3 border-hair border-b py-1.5"
            title={method}
          >
            <span>{requirement}</span>
            <span className="flex items-baseline gap-3">
              <span
                className={classes(
                  'font-semibold',
                  outcome === 'meets' && 'text-pass',
                  outcome === 'unknown' && 'text-thin',
                  outcome === 'misses' && 'text-fail',
                )}
              >
                {words[outcome]}
              </span>
              <Grade grade={grade} method={method} />
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

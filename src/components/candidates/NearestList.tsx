import { citationFrom, citationText } from '@/components/codes/citation-text.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { titleOf } from './candidate-words.ts';
import type { Candidates } from './use-candidates.ts';

/** Where nothing fits: the theorems in the way, and what comes nearest when one requirement alone is given up. */
export function NearestList({ nearest, obstacles }: Pick<Candidates, 'nearest' | 'obstacles'>) {
  return (
    <section aria-label="Nothing fits" className="grid gap-4 border border-rule border-dashed px-5 py-6">
      <h2>No construction in the catalogue fits this window</h2>
      {obstacles.map(({ rule, statement, source }) => {
        const citation = citationFrom(source);
        return (
          <Notice key={rule + statement} kind="fail" word="Impossible">
            {statement}
            {citation && <span className="mt-1 block text-quiet text-tiny">{citationText(citation)}</span>}
          </Notice>
        );
      })}
      {nearest.length === 0 ? (
        <p className="text-quiet">No single requirement, given up alone, lets one in. Widen two of them.</p>
      ) : (
        <div>
          <p className="text-quiet">With one requirement given up, these come nearest:</p>
          <ul className="mt-2 grid">
            {nearest.map(({ givenUp, direction, words, entry }) => (
              <li key={`${givenUp}-${direction}`} className="border-hair border-b py-1.5">
                <span className="font-semibold">{words}</span>: {titleOf(entry)}, n = {wholeNumber(entry.n)}
              </li>
            ))}
          </ul>
        </div>
      )}
    </section>
  );
}

import { citationFrom, citationText } from '@/components/codes/citation-text.ts';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { titleOf } from './candidate-words.ts';
import type { Candidates } from './use-candidates.ts';

/** Where nothing fits: the theorems in the way, and what comes nearest when one requirement alone is given up. */
export function NearestList({ nearest, obstacles }: Pick<Candidates, 'nearest' | 'obstacles'>) {
  return (
    <EmptyState title="No construction in the catalogue fits this window">
      {obstacles.map(({ rule, statement, source }) => {
        const cited = citationFrom(source);
        return (
          <span key={`${rule} ${statement}`} className="mb-2 block text-ink">
            <span className="font-semibold text-fail">Impossible.</span> {statement}
            {cited && <span className="block text-quiet text-tiny">{citationText(cited)}</span>}
          </span>
        );
      })}
      {nearest.length === 0
        ? 'No single requirement, given up alone, lets one in. Widen two of them.'
        : 'With one requirement given up, these come nearest:'}
      {nearest.map(({ givenUp, direction, words, entry }) => (
        <span key={`${givenUp}-${direction}`} className="mt-2 block text-ink">
          <span className="font-semibold">{words}</span>: {titleOf(entry)}, n = {entry.n}
        </span>
      ))}
    </EmptyState>
  );
}

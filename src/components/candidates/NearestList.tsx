import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { titleOf } from './candidate-words.ts';
import type { Candidates } from './use-candidates.ts';

/** Where nothing fits: what comes nearest when one requirement alone is given up. */
export function NearestList({ nearest }: Pick<Candidates, 'nearest'>) {
  return (
    <EmptyState title="No construction in the catalogue fits this window">
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

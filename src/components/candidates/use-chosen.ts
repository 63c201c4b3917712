import type { CandidateRow } from '@/api/catalogue.ts';
import { endpoints } from '@/api/endpoints.ts';
import { useApi } from '@/client/hooks.ts';
import type { CatalogueParams } from './filters.ts';

/** The chosen candidate: from the rows at hand or, when a link names one further down, asked for by its id.
 *  `undefined` while it is on its way, `null` when the window does not hold it. */
export function useChosen(
  id: string | null,
  rows: readonly CandidateRow[],
  query: CatalogueParams | null,
): CandidateRow | null | undefined {
  const here = id === null ? null : rows.find((row) => row.id === id);
  const { sort: _sort, descending: _descending, meetsFirst: _meetsFirst, ...window } = query ?? {};
  const asked = useApi(endpoints.findCandidate, id !== null && !here && query ? { query: { ...window, id } } : null, {
    revalidateOnFocus: false,
  });
  if (id === null) return null;
  return here ?? (asked.error ? null : asked.data?.candidate);
}

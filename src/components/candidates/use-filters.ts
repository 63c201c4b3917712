import { useCallback, useMemo, useSyncExternalStore } from 'react';
import { type ChoiceName, choiceNames, type FilterName, type Filters, filterFields } from './filters.ts';

const CHANGE = 'filterschange';
const names: readonly (FilterName | ChoiceName | 'chosen')[] = [
  ...filterFields.map(({ name }) => name),
  ...choiceNames,
  'chosen',
];

function subscribe(listener: () => void): () => void {
  window.addEventListener(CHANGE, listener);
  window.addEventListener('popstate', listener);
  return () => {
    window.removeEventListener(CHANGE, listener);
    window.removeEventListener('popstate', listener);
  };
}

export interface FilterState {
  filters: Filters;
  /** Id of the candidate whose numbers are shown beside the table. */
  chosen: string | null;
  /** Changes what is named; an empty text takes a filter away. */
  change(next: Filters & { chosen?: string }): void;
  /** Puts these filters in place of all others. */
  replace(next: Filters): void;
}

/** Filters, order and selection live in the address, so that a link restores them. */
export function useFilters(): FilterState {
  const search = useSyncExternalStore(
    subscribe,
    () => location.search,
    () => '',
  );
  const { chosen = null, ...filters } = useMemo(() => {
    const params = new URLSearchParams(search);
    return Object.fromEntries(
      names.flatMap((name) => (params.get(name) ? [[name, params.get(name)!]] : [])),
    ) as Filters & { chosen?: string };
  }, [search]);
  const change = useCallback((next: Record<string, string | undefined>) => write(next, new URL(location.href)), []);
  const replace = useCallback((next: Record<string, string | undefined>) => {
    const url = new URL(location.href);
    for (const name of names) url.searchParams.delete(name);
    write(next, url);
  }, []);
  return { filters, chosen, change, replace };
}

function write(next: Record<string, string | undefined>, url: URL): void {
  for (const [name, text] of Object.entries(next)) {
    if (text) url.searchParams.set(name, text);
    else url.searchParams.delete(name);
  }
  if (url.href === location.href) return;
  history.replaceState(history.state, '', url);
  window.dispatchEvent(new Event(CHANGE));
}

import { useCallback, useMemo, useSyncExternalStore } from 'react';
import { type Filters, orderNames, windowNames } from './filters.ts';

const CHANGE = 'filterschange';
const names = [...windowNames, ...orderNames, 'chosen', 'columns', 'window'] as const;
type Name = (typeof names)[number];
type Texts = Partial<Record<Name, string>>;

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
  /** Keys of the columns asked for; null for those that fit. */
  columns: readonly string[] | null;
  /** The address states nothing at all, as on a first visit. */
  isBare: boolean;
  /** Changes what is named; an empty text takes it away. */
  change(next: Texts): void;
  /** Puts this window in place of the present one; order and columns stay. */
  replace(next: Filters): void;
}

/** Window, order, columns and selection live in the address, so that a link restores them. A window that was emptied is
 *  written as `window=open`, which tells it from a first visit. */
export function useFilters(): FilterState {
  const search = useSyncExternalStore(
    subscribe,
    () => location.search,
    () => '',
  );
  const { chosen = null, columns, window: _window, ...filters } = useMemo(() => textsIn(search), [search]);
  const change = useCallback((next: Texts) => write(next, new URL(location.href)), []);
  const replace = useCallback((next: Filters) => {
    const url = new URL(location.href);
    for (const name of [...windowNames, 'chosen']) url.searchParams.delete(name);
    write(next, url);
  }, []);
  const isBare = Object.keys(textsIn(search)).length === 0;
  return { filters, chosen, columns: columns?.split(',').filter(Boolean) ?? null, isBare, change, replace };
}

function textsIn(search: string): Texts {
  const params = new URLSearchParams(search);
  return Object.fromEntries(names.flatMap((name) => (params.get(name) ? [[name, params.get(name)!]] : [])));
}

function write(next: Texts, url: URL): void {
  for (const [name, text] of Object.entries(next)) {
    if (text) url.searchParams.set(name, text);
    else url.searchParams.delete(name);
  }
  if (windowNames.some((name) => url.searchParams.get(name))) url.searchParams.delete('window');
  else url.searchParams.set('window', 'open');
  if (url.href === location.href) return;
  history.replaceState(history.state, '', url);
  window.dispatchEvent(new Event(CHANGE));
}

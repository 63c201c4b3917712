import { useCallback, useSyncExternalStore } from 'react';

/** What is chosen on a page lives in its address, so that a link restores it. Islands of one page see each other's
 *  changes; the back button is not filled with steps of zooming. */
const CHANGE = 'addresschange';

function subscribe(listener: () => void): () => void {
  window.addEventListener(CHANGE, listener);
  window.addEventListener('popstate', listener);
  return () => {
    window.removeEventListener(CHANGE, listener);
    window.removeEventListener('popstate', listener);
  };
}

/** A parameter of the address; null when absent, and on the server. */
export function useUrlParam(name: string): [string | null, (value: string | null) => void] {
  const value = useSyncExternalStore(
    subscribe,
    () => new URLSearchParams(location.search).get(name),
    () => null,
  );
  const set = useCallback((next: string | null) => setUrlParam(name, next), [name]);
  return [value, set];
}

function setUrlParam(name: string, value: string | null): void {
  const url = new URL(location.href);
  if (value === null || value === '') url.searchParams.delete(name);
  else url.searchParams.set(name, value);
  if (url.href === location.href) return;
  history.replaceState(history.state, '', url);
  window.dispatchEvent(new Event(CHANGE));
}

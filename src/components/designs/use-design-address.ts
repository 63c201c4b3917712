import { useCallback, useMemo, useSyncExternalStore } from 'react';

const CHANGE = 'designaddresschange';

export const drawingKinds = ['graph', 'incidence', 'plot'] as const;
export type DrawingKind = (typeof drawingKinds)[number];

/** What a link to a design restores. Texts as typed, since the design that judges them may not be open yet. */
export interface DesignAddress {
  /** Number of the chosen block. */
  block?: string;
  /** Points that the listed blocks must hold. */
  through?: string;
  /** Number of the class shown alone. */
  class?: string;
  drawing?: DrawingKind;
}

function subscribe(listener: () => void): () => void {
  window.addEventListener(CHANGE, listener);
  window.addEventListener('popstate', listener);
  return () => {
    window.removeEventListener(CHANGE, listener);
    window.removeEventListener('popstate', listener);
  };
}

/** The selections of the design's page, kept in its address. An empty text takes one away. */
export function useDesignAddress(): {
  address: DesignAddress;
  change(next: Partial<Record<keyof DesignAddress, string>>): void;
} {
  const search = useSyncExternalStore(
    subscribe,
    () => location.search,
    () => '',
  );
  const address = useMemo(() => addressFrom(search), [search]);
  const change = useCallback((next: Partial<Record<keyof DesignAddress, string>>) => {
    const url = new URL(location.href);
    for (const [name, text] of Object.entries(next)) {
      if (text) url.searchParams.set(name, text);
      else url.searchParams.delete(name);
    }
    if (url.href === location.href) return;
    history.replaceState(history.state, '', url);
    window.dispatchEvent(new Event(CHANGE));
  }, []);
  return { address, change };
}

export function addressFrom(search: string): DesignAddress {
  const given = new URLSearchParams(search);
  const drawing = drawingKinds.find((kind) => kind === given.get('drawing'));
  const texts = (['block', 'through', 'class'] as const).flatMap((name) =>
    given.get(name) ? [[name, given.get(name)!]] : [],
  );
  return { ...Object.fromEntries(texts), ...(drawing && { drawing }) };
}

import { useEffect, useRef } from 'react';

/** Puts text before the page's own title, as in "62 % · Run 7", and takes it away again. */
export function useDocumentTitle(prefix: string | null): void {
  const own = useRef<string | null>(null);
  useEffect(() => {
    own.current ??= document.title;
    document.title = prefix === null ? own.current : `${prefix} · ${own.current}`;
  }, [prefix]);
  useEffect(
    () => () => {
      if (own.current !== null) document.title = own.current;
    },
    [],
  );
}

import { useEffect } from 'react';

/** Calls back when the page changes between paper and blueprint: by choice, with the system, or for printing. */
export function useGroundChange(changed: () => void): void {
  useEffect(() => {
    const causes = ['(prefers-color-scheme: dark)', 'print'].map((query) => window.matchMedia(query));
    document.addEventListener('groundchange', changed);
    for (const cause of causes) cause.addEventListener('change', changed);
    return () => {
      document.removeEventListener('groundchange', changed);
      for (const cause of causes) cause.removeEventListener('change', changed);
    };
  }, [changed]);
}

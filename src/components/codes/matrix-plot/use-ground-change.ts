import { useEffect } from 'react';

/** Calls back when the page changes between paper and blueprint, by choice or with the system. */
export function useGroundChange(changed: () => void): void {
  useEffect(() => {
    const system = window.matchMedia('(prefers-color-scheme: dark)');
    document.addEventListener('groundchange', changed);
    system.addEventListener('change', changed);
    return () => {
      document.removeEventListener('groundchange', changed);
      system.removeEventListener('change', changed);
    };
  }, [changed]);
}

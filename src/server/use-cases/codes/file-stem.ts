import type { Code } from '@/api/codes.ts';

/** A file name that tells the code on its own: design, length, dimension and the fingerprint's beginning. */
export function fileStem(code: Pick<Code, 'designTitle' | 'n' | 'k' | 'fingerprint'>): string {
  const design = code.designTitle
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '')
    .slice(0, 60);
  return `${design || 'code'}-n${code.n}-k${code.k}-${code.fingerprint.slice(0, 8)}`;
}

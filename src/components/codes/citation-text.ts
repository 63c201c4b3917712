import type { Citation } from '@/core/errors.ts';

/** "J. Singer 1938, A theorem in …, Trans. Amer. Math. Soc. 43, 377–385". */
export function citationText({ authors, year, title, where, part }: Citation): string {
  return [`${authors} ${year}`, title, where, part].filter(Boolean).join(', ');
}

/** "Singer 1938": surnames and year, for a line that has little room. */
export function shortCitation({ authors, year }: Pick<Citation, 'authors' | 'year'>): string {
  const surnames = authors.split(/,| and /).map((name) => name.trim().replace(/^([A-Z]\.[\s-]?)+/, ''));
  const shown = surnames.filter(Boolean);
  const names = shown.length > 2 ? `${shown[0]} and others` : shown.join(' and ');
  return `${names} ${year}`;
}

/** A source that came over the network, when it has the shape of a citation. */
export function citationFrom(source: unknown): Citation | null {
  const given = source as Partial<Citation> | null | undefined;
  return typeof given?.authors === 'string' && typeof given.year === 'number' && typeof given.title === 'string'
    ? (given as Citation)
    : null;
}

/** The ground a reader chose, kept in a cookie so that the server can send the page on the right one at once. */
export const GROUND_COOKIE = 'ground';
export const GROUNDS = ['paper', 'blueprint', 'system'] as const;
export type Ground = (typeof GROUNDS)[number];

export function groundFrom(value: string | undefined): Ground {
  return GROUNDS.find((ground) => ground === value) ?? 'system';
}

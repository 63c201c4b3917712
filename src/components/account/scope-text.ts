import type { Scope } from '@/api/tokens.ts';

/** What each scope opens, in a sentence. */
export const SCOPE_TEXT: Record<Scope, string> = {
  read: 'Reads everything in your projects.',
  run: 'Starts projects, keeps codes, states and steers runs, hands in their results, waits for them.',
  'release:read': 'Fetches releases and their files, and nothing else.',
};

/** A letter is tried twelve times, the wait doubling from half a minute: the last try comes about seventeen hours after
 *  the first, so that a night without a mail server loses nothing. */
export const mostAttempts = 12;
const firstWaitMs = 30_000;

/** How long to wait after so many tries. */
export const waitAfterMs = (attempts: number): number => firstWaitMs * 2 ** (attempts - 1);

/** Whether a mail server has refused this very letter for good (RFC 5321 §4.2.1: 5yz) after it let us in; a refused
 *  sign-in is a setting to be mended, and worth trying again. */
export function isPermanent(error: unknown): boolean {
  const { responseCode, command } = error as { responseCode?: number; command?: string };
  const ofLetter = command === 'RCPT TO' || command === 'MAIL FROM' || command === 'DATA';
  return ofLetter && responseCode !== undefined && responseCode >= 500 && responseCode < 600;
}

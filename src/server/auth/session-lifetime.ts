/** A session ends a week after signing in, whatever its use. */
export const sessionSeconds = 7 * 24 * 3600;

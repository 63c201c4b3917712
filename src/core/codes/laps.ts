/** Milliseconds since it was last asked; undefined without a clock, since the engine reads none of its own. */
export function laps(clock?: () => number): () => number | undefined {
  if (!clock) return () => undefined;
  let from = clock();
  return () => {
    const now = clock();
    const elapsedMs = now - from;
    from = now;
    return elapsedMs;
  };
}

/** Analyses under way in this process: how far each is, and how it is ended. */
interface OpenAnalysis {
  controller: AbortController;
  share: number | null;
}

const open = new Map<string, OpenAnalysis>();

export function openAnalysis(id: string): OpenAnalysis {
  const analysis: OpenAnalysis = { controller: new AbortController(), share: null };
  open.set(id, analysis);
  return analysis;
}

export const shareOf = (id: string): number | null => open.get(id)?.share ?? null;

/** Ends the worker at once. */
export const abortAnalysis = (id: string): void => open.get(id)?.controller.abort();

export const closeAnalysis = (id: string): void => void open.delete(id);

/** An engine error as data, since classes do not cross a worker's border. */
export interface WorkerFailure {
  code: string;
  message: string;
  data: Record<string, unknown>;
}

/** @throws what is no Error at all. */
export function failureOf(error: unknown): WorkerFailure {
  if (!(error instanceof Error)) throw error;
  const { name: _name, stack: _stack, message, ...data } = error as Error & { code?: string };
  return { code: data.code ?? 'internal', message, data: { ...data } };
}

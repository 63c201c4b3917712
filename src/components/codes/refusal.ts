import type { Citation } from '@/core/errors.ts';
import { citationFrom } from './citation-text.ts';

/** Why the engine would not, in a shape that both its errors and the server's answers fit. */
export type Refusal =
  | { kind: 'param'; param: string; accepted: string; message: string }
  | { kind: 'infeasible'; rule: string; statement: string; source: Citation | null; param: string | null }
  | { kind: 'limit' | 'other'; message: string };

/** Reads an engine error, or the data of one that crossed a worker's border. */
export function refusalFrom(code: unknown, message: string, data: object): Refusal {
  const given = data as Record<string, unknown>;
  const param = typeof given.param === 'string' ? given.param : null;
  if (code === 'param' && param) {
    return { kind: 'param', param: param.replace(/^params\./, ''), accepted: String(given.accepted), message };
  }
  if (code === 'infeasible') {
    const { rule, statement } = given;
    return {
      kind: 'infeasible',
      rule: String(rule),
      statement: String(statement ?? message),
      source: citationFrom(given.source),
      param,
    };
  }
  return { kind: code === 'limit' ? 'limit' : 'other', message };
}

export function refusalOf(error: unknown): Refusal {
  if (!(error instanceof Error)) return { kind: 'other', message: 'The engine stopped without saying why.' };
  return refusalFrom('code' in error ? error.code : undefined, error.message, error);
}

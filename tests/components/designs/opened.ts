import type { DesignDesk } from '@/client/analyse-pool.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { type OpenedDesign, openDesign } from '@/core/designs/open-design.ts';
import { designQuestions } from '@/core/designs/questions/index.ts';

export const opened = (family: string, params: DesignSpec['params']): OpenedDesign =>
  openDesign({ kind: 'spec', spec: { family, params } }, { clock: () => 0 });

/** The desk's work on the page's own thread: the same engine without a worker between. */
export const deskHere: DesignDesk = {
  open: async (source) => ({ value: openDesign(source, { clock: () => 0 }), elapsedMs: 3 }),
  ask: async (design, question, { signal: _signal, ...options } = {}) => ({
    value: designQuestions[question].answer(design, options) as never,
    elapsedMs: 12,
  }),
  close() {},
};

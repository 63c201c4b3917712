import type { Graded } from '../../evidence.ts';
import { boseResolvable } from '../feasibility/bose-resolvable.ts';
import { DEFAULT_RESOLUTION_NODES, type ResolutionOutcome, searchResolution } from '../resolve.ts';
import { type DesignOutline, type DesignQuestion, outlineOf } from './question.ts';

export interface ResolutionAnswer {
  resolvable: Graded<'yes' | 'no' | 'undecided'>;
  /** Class of each block. */
  classes: Uint32Array | null;
  /** Number of classes; 0 without a resolution. */
  classCount: number;
  nodes: number;
}

/** Whether the blocks fall into parallel classes, each a partition of the points. */
export const resolution: DesignQuestion<ResolutionAnswer> = {
  obstacle: () => null,
  answer(opened, { seed, limit = DEFAULT_RESOLUTION_NODES }) {
    const forbidden = boseForbids(outlineOf(opened));
    if (forbidden) return { resolvable: forbidden, classes: null, classCount: 0, nodes: 0 };
    const outcome = searchResolution(opened.design, { seed, limit });
    const { classes, nodes } = outcome;
    return { resolvable: graded(outcome), classes, classCount: classes ? new Set(classes).size : 0, nodes };
  },
};

function boseForbids({ t, v, k, lambda, holds }: DesignOutline): ResolutionAnswer['resolvable'] | undefined {
  if (!holds || t < 2 || k === null || k === v) return undefined;
  const statement = boseResolvable.forbids?.({ t, v, k, lambda, resolvable: true });
  return statement ? { value: 'no', grade: 'proved', method: statement, source: boseResolvable.source } : undefined;
}

function graded({ reason, detail, nodes }: ResolutionOutcome): ResolutionAnswer['resolvable'] {
  switch (reason) {
    case 'given':
    case 'found':
      return { value: 'yes', grade: 'computed', method: detail };
    case 'none':
      return { value: 'no', grade: nodes === 0 ? 'proved' : 'computed', method: detail };
    case 'limit':
      return { value: 'undecided', grade: 'bounded', method: `${detail}; this proves nothing either way` };
  }
}

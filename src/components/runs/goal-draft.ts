import type { Goal } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { numberOf } from './number-of.ts';
import { ACCEPTED, type FieldErrors } from './run-accepted.ts';
import type { RunDraft } from './run-draft.ts';

/** What the form asks the planner for: unchecked numbers, which the schema judges. */
export function goalOf(draft: RunDraft, codeIds: readonly string[], decoders: readonly DecoderSpec[]): Goal | null {
  if (draft.points === 'curve') {
    const curves = codeIds.flatMap((codeId) => decoders.map((decoder) => ({ codeId, decoder })));
    return {
      ...{ kind: 'curve', curves },
      ...{ from: numberOf(draft.from), to: numberOf(draft.to), points: numberOf(draft.mostPoints) },
    };
  }
  if (draft.points !== 'limit') return null;
  const { limitRate: rate } = draft;
  return {
    ...{ kind: 'limit', codeId: codeIds[0] ?? '', decoder: decoders[0] ?? { kind: 'majority-logic' }, rate },
    ...{ p: numberOf(draft.targetP), target: numberOf(draft.limitTarget), level: numberOf(draft.limitLevel) },
  };
}

/** What a goal asks for beyond the schema. */
export function goalErrors(draft: RunDraft, decoders: readonly DecoderSpec[]): FieldErrors {
  const errors: FieldErrors = {};
  if (draft.points === 'curve' && numberOf(draft.from) < numberOf(draft.to)) errors.from = ACCEPTED.fromAbove;
  if (draft.points !== 'limit') return errors;
  if (draft.codeIds.length !== 1) errors.codeIds = ACCEPTED.oneCode;
  if (decoders.length !== 1) errors.decoders = ACCEPTED.oneDecoder;
  return errors;
}

/** Where a refusal of the goal, "goal.target" or "goal.curves.0.decoder.threshold", belongs in the form. */
export function goalField(goal: Goal | null | undefined, [part = '', index, inner, last]: readonly string[]): string {
  if (part === 'curves' && goal?.kind === 'curve') {
    if (inner === 'codeId') return 'codeIds';
    return `${goal.curves[Number(index)]?.decoder.kind}.${last ?? ''}`;
  }
  if (part === 'decoder' && goal?.kind === 'limit') return `${goal.decoder.kind}.${index ?? ''}`;
  return GOAL_FIELDS[part] ?? part;
}

const GOAL_FIELDS: Readonly<Record<string, string>> = {
  codeId: 'codeIds',
  points: 'mostPoints',
  p: 'targetP',
  target: 'limitTarget',
  level: 'limitLevel',
};

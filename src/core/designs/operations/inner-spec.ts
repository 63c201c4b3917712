import { z } from 'zod';
import type { DesignSpec } from '../block-design.ts';
import { predictTwoDesignCodes, rankOfTwoDesign, type TwoDesignCounts } from '../code-prediction.ts';
import { familyById } from '../families/index.ts';
import type { CodePrediction, DesignPrediction, EnumerationWindow, ParamInfo } from '../family.ts';
import { between } from '../partial-linear-prediction.ts';
import { binomial } from '../subset-rank.ts';

/** Operations within operations that are followed. */
const MAX_DEPTH = 6;

/** The spec an operation acts on: an object, or the same as JSON text. */
export const innerSpecSchema = z.preprocess(
  fromText,
  z.custom<DesignSpec>((value) => depthOf(value) <= MAX_DEPTH),
);

export const innerSpecParam = (name: string, example: DesignSpec): ParamInfo => ({
  name,
  label: 'design',
  kind: 'spec',
  accepted: `a design: {"family": …, "params": {…}}, operations nested ${MAX_DEPTH} deep at most`,
  example: JSON.stringify(example),
});

function fromText(value: unknown): unknown {
  if (typeof value !== 'string' || value.length > 4096) return value;
  try {
    return JSON.parse(value);
  } catch {
    return value;
  }
}

/** Levels of nesting; Infinity for what is not a spec. */
function depthOf(value: unknown): number {
  if (typeof value !== 'object' || value === null || !('family' in value) || !('params' in value)) return Infinity;
  const { family, params } = value;
  if (typeof family !== 'string' || typeof params !== 'object' || params === null) return Infinity;
  let deepest = 0;
  for (const inner of Object.values(params)) {
    if (typeof inner === 'object' && inner !== null && !Array.isArray(inner))
      deepest = Math.max(deepest, depthOf(inner));
  }
  return deepest + 1;
}

/** Blocks on s points of a t-design, s ≤ t: λ·C(v−s, t−s)/C(k−s, t−s). */
export function lambdaAt({ t, v, k, lambda }: DesignPrediction, s: number): number {
  return Math.round((lambda * binomial(v - s, t - s)) / binomial(k - s, t - s));
}

/** Codes of what an operation leaves, when it is a 2-design. Blocks may repeat, so the rank is bounded more weakly. */
export function codesOfTwoDesign(counts: TwoDesignCounts): CodePrediction[] {
  const general = rankOfTwoDesign(counts);
  if (general.grade !== 'bounded' || counts.lambda === 1) return predictTwoDesignCodes(counts);
  return predictTwoDesignCodes(counts, { rank: between(1, general.value.upper, 'not zero; number of points') });
}

/** Specs of one family inside a window, for operations to enumerate over. */
export function* specsOf(family: string, window: EnumerationWindow): Generator<DesignSpec> {
  for (const params of familyById(family).enumerate(window)) yield { family, params: params as DesignSpec['params'] };
}

import type { z } from 'zod';
import { type Citation, ParamError } from '../errors.ts';
import type { Enclosure, Graded } from '../evidence.ts';
import type { BlockDesign, DesignSpec } from './block-design.ts';

/** One parameter of a family, for forms and documentation. */
export interface ParamInfo {
  name: string;
  /** Label in words, e.g. "order q". */
  label: string;
  kind: 'integer' | 'choice' | 'text' | 'spec' | 'list';
  /** What is accepted, as a phrase. */
  accepted: string;
  choices?: readonly string[];
  /** A value that works, shown to begin with. */
  example: number | string;
  optional?: boolean;
}

/** What closed formulas say of a family's code without building it: checks = blocks unless said otherwise. */
export interface CodePrediction {
  checks: 'blocks' | 'points';
  n: number;
  /** Rank over GF(2); an enclosure when no formula is known. */
  rank: Graded<Enclosure>;
  k: Graded<Enclosure>;
  girth: Graded<Enclosure>;
  distance: Graded<Enclosure>;
  rowWeight: number;
  columnWeight: number;
  /** Errors that one-step majority logic always corrects. */
  oneStepRadius: Graded<number>;
  structure: 'cyclic' | 'quasi-cyclic' | 'none';
}

/** A design's parameters by formula: every t-subset of the v points lies in lambda of the b blocks of size k. */
export interface DesignPrediction {
  t: number;
  v: number;
  b: number;
  k: number;
  /** Blocks on a point. */
  r: number;
  lambda: number;
  /** Two points lie on at most one block; said of geometries that are no 2-designs. Then t = 1 and lambda = r. */
  partialLinear?: boolean;
  resolvable?: boolean;
  cyclic?: boolean;
  /** Codes by orientation, where formulas say something. */
  codes: CodePrediction[];
}

/** A window that bounds the enumeration of parameter sets. */
export interface EnumerationWindow {
  maxPoints: number;
  maxBlocks: number;
}

export interface Family<P = unknown> {
  id: string;
  title: string;
  params: ParamInfo[];
  source: Citation;
  /** Checks raw parameters. @throws ParamError or InfeasibleError. */
  parse(params: DesignSpec['params']): P;
  /** Parameter sets inside the window, in increasing size. */
  enumerate(window: EnumerationWindow): Iterable<P>;
  predict(params: P): DesignPrediction;
  /** @throws LimitError when the design passes what is built here. */
  build(params: P): BlockDesign;
}

export interface FamilyDefinition<S extends z.ZodType> {
  id: string;
  title: string;
  params: ParamInfo[];
  source: Citation;
  schema: S;
  /** Further arithmetic conditions, with the rule that refuses; runs after the schema. */
  require?(params: z.infer<S>): void;
  enumerate(window: EnumerationWindow): Iterable<z.infer<S>>;
  predict(params: z.infer<S>): DesignPrediction;
  build(params: z.infer<S>): BlockDesign;
}

/** Makes a family out of its definition: validation at the door, the spec stamped on what leaves. */
export function defineFamily<S extends z.ZodType>(definition: FamilyDefinition<S>): Family<z.infer<S>> {
  const { schema, require, ...rest } = definition;
  return {
    ...rest,
    parse(raw) {
      const parsed = schema.safeParse(raw);
      if (!parsed.success) throw paramErrorFrom(parsed.error, raw, definition.params);
      require?.(parsed.data);
      return parsed.data;
    },
    build(params) {
      const design = definition.build(params);
      return { ...design, spec: { family: definition.id, params: params as DesignSpec['params'] } };
    },
  };
}

function paramErrorFrom(error: z.ZodError, raw: DesignSpec['params'], infos: ParamInfo[]): ParamError {
  const issue = error.issues[0]!;
  const unknownKey = issue.code === 'unrecognized_keys' ? issue.keys[0] : undefined;
  const name = String(unknownKey ?? issue.path[0] ?? 'params');
  const info = infos.find((p) => p.name === name);
  const accepted = info?.accepted ?? `only ${infos.map((p) => p.name).join(', ')}`;
  return new ParamError(name, raw?.[name], accepted);
}

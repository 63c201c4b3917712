import { type Citation, ParamError } from '../../errors.ts';
import type { DesignSpec } from '../block-design.ts';
import { asymptoticNotes } from './asymptotic.ts';
import { boseResolvable } from './bose-resolvable.ts';
import { bruckRyserChowla } from './bruck-ryser-chowla.ts';
import { constructionFor } from './constructions.ts';
import { copies } from './copies.ts';
import { consequencesOf } from './derived-chain.ts';
import { divisibility } from './divisibility.ts';
import { fisher } from './fisher.ts';
import { knownDesigns, sourceOfKnown } from './known-designs.ts';
import { knownExceptions, sourceOfException } from './known-exceptions.ts';
import { rayChaudhuriWilson } from './ray-chaudhuri-wilson.ts';
import { residualEmbedding } from './residual-embedding.ts';
import { type DesignQuery, type FeasibilityRule, nameOf } from './rule.ts';
import { spectrumRules } from './spectra.ts';
import { trivial } from './trivial.ts';

export interface FeasibilityReason {
  rule: string;
  statement: string;
  source: Citation;
}

export interface Feasibility {
  verdict: 'exists' | 'impossible' | 'open';
  /** The verdict in words; "exists, not built here" is one of its own. */
  words: 'exists, built here' | 'exists, not built here' | 'impossible' | 'open';
  reasons: FeasibilityReason[];
  /** How to build one here, when it can be. */
  construction: DesignSpec | null;
}

/** Rules that can forbid, cheapest first. */
const forbidding: readonly FeasibilityRule[] = [
  divisibility,
  fisher,
  rayChaudhuriWilson,
  bruckRyserChowla,
  residualEmbedding,
  boseResolvable,
  knownExceptions,
];

/** Rules that grant a design without building it. */
const granting: readonly FeasibilityRule[] = [...spectrumRules, knownDesigns, copies];

/** Whether a t-(v,k,λ) design exists, with the theorem that says so. "exists" always names a construction or a citation.
 *  @throws ParamError unless 1 ≤ t ≤ k ≤ v ≤ 10^6, t ≤ 8 and λ ≥ 1 are whole numbers. */
export function feasibility(query: DesignQuery): Feasibility {
  refuseMalformed(query);
  const granted = grantOf([trivial], query);
  const against = granted ? null : obstacleTo(query);
  if (against) return { verdict: 'impossible', words: 'impossible', reasons: [against], construction: null };
  const construction = constructionFor(query);
  const reasons = [granted ?? grantOf(granting, query)].filter((reason) => reason !== null);
  if (construction)
    return {
      verdict: 'exists',
      words: 'exists, built here',
      reasons: [...reasons, builtBy(construction)],
      construction,
    };
  if (reasons.length > 0) return { verdict: 'exists', words: 'exists, not built here', reasons, construction: null };
  const notes = asymptoticNotes.filter((note) => note.appliesTo(query));
  return {
    verdict: 'open',
    words: 'open',
    reasons: notes.map(({ id, statement, source }) => ({ rule: id, statement, source })),
    construction: null,
  };
}

/** The first theorem that forbids the design, or forbids one that it would contain; null when none does. */
export function obstacleTo(query: DesignQuery): FeasibilityReason | null {
  for (const rule of forbidding) {
    const statement = rule.forbids?.(query);
    if (statement) return { rule: rule.id, statement, source: sourceFor(rule, query) };
  }
  for (const inner of consequencesOf(query)) {
    const reason = obstacleTo(inner.query);
    if (reason)
      return {
        ...reason,
        statement: `A ${nameOf(query)} design would have ${inner.words}, a ${nameOf(inner.query)} design. ${reason.statement}`,
      };
  }
  return null;
}

const sourceFor = (rule: FeasibilityRule, query: DesignQuery) =>
  (rule === knownExceptions ? sourceOfException(nameOf(query)) : undefined) ??
  (rule === knownDesigns ? sourceOfKnown(nameOf(query)) : undefined) ??
  rule.source;

function grantOf(rules: readonly FeasibilityRule[], query: DesignQuery): FeasibilityReason | null {
  for (const rule of rules) {
    const statement = rule.grants?.(query);
    if (statement) return { rule: rule.id, statement, source: sourceFor(rule, query) };
  }
  return null;
}

const builtBy = (spec: DesignSpec): FeasibilityReason => ({
  rule: 'construction',
  statement: `The family ${spec.family} gives one, built and verified here on request.`,
  source: { authors: 'this program', year: 2026, title: 'built here, re-checkable from its blocks' },
});

function refuseMalformed({ t, v, k, lambda }: DesignQuery): void {
  if (!Number.isInteger(t) || t < 1 || t > 8) throw new ParamError('t', t, 'a whole number from 1 to 8');
  if (!Number.isInteger(v) || v < 2 || v > 1_000_000)
    throw new ParamError('v', v, 'a whole number from 2 to 1 000 000');
  if (!Number.isInteger(k) || k < t || k > v) throw new ParamError('k', k, `a whole number from t = ${t} to v = ${v}`);
  if (!Number.isInteger(lambda) || lambda < 1 || lambda > 1e9)
    throw new ParamError('lambda', lambda, 'a whole number from 1 to 10^9');
}

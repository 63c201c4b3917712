import { useEffect, useMemo, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import { numberOf } from './number-of.ts';
import { emptyDraft, judgeDraft, OFFERED_DECODERS, type RunDraft } from './run-draft.ts';
import {
  freshSeed,
  proposedFramesPerShard,
  proposedLimit,
  proposedName,
  proposedSweep,
  proposedWeights,
} from './run-proposals.ts';

/** The form's state, its proposals and its verdict. A proposal gives way to what was typed. */
export function useRunDraft(codes: readonly Code[] | undefined, requirements: Requirements | null | undefined) {
  const [typed, setTyped] = useState<Partial<RunDraft>>({});
  const [base, setBase] = useState(emptyDraft);

  const [addressed, setAddressed] = useState<Partial<RunDraft>>({});

  useEffect(() => {
    setBase((draft) => ({ ...draft, ...prefilled(location.search), seed: freshSeed() }));
    setAddressed(prefilledStrata(location.search));
  }, []);

  const draft = useMemo(() => {
    const sweep = proposedSweep(requirements);
    const chosen = chosenOf(codes, typed.codeIds ?? base.codeIds);
    const targetP = sweep ? { targetP: sweep.to } : {};
    const limit = { ...proposedLimit(requirements), ...(typed.points === 'limit' && { maxFrames: '1e8' }) };
    const frames = chosen.length > 0 ? { framesPerShard: String(proposedFramesPerShard(chosen)) } : {};
    const known = codes && { codeIds: chosen.map((code) => code.id) };
    const weights = proposedWeights(chosen, numberOf(typed.targetP ?? sweep?.to ?? base.targetP));
    return { ...base, ...sweep, ...targetP, ...limit, ...frames, ...weights, ...addressed, ...typed, ...known };
  }, [base, addressed, typed, codes, requirements]);

  const name = proposedName(draft, codes ?? []);
  const chosen = useMemo(() => chosenOf(codes, draft.codeIds), [codes, draft.codeIds]);
  const shortest = Math.min(...chosen.map(({ n }) => n));
  return {
    draft,
    chosen,
    name,
    judged: useMemo(() => judgeDraft(draft, name, shortest), [draft, name, shortest]),
    change: (change: Partial<RunDraft>) => setTyped((before) => ({ ...before, ...change })),
  };
}

const chosenOf = (codes: readonly Code[] | undefined, ids: readonly string[]): Code[] =>
  (codes ?? []).filter((code) => ids.includes(code.id));

/** `?strata=9..40&frames=200000&at=0.004` proposes weights, frames a weight and the target p. */
export function prefilledStrata(search: string): Partial<RunDraft> {
  const query = new URLSearchParams(search);
  const [from, to] = (query.get('strata') ?? '').split('..');
  if (!from || !to) return {};
  const [frames, at] = [query.get('frames'), query.get('at')];
  return {
    points: 'strata',
    weightFrom: from,
    weightTo: to,
    ...(frames === null ? {} : { framesPerWeight: frames }),
    ...(at === null ? {} : { targetP: at }),
  };
}

/** `?code=…&code=…&decoder=sum-product` chooses codes and decoders. */
export function prefilled(search: string): Partial<RunDraft> {
  const query = new URLSearchParams(search);
  const codeIds = query.getAll('code').flatMap((text) => text.split(','));
  const decoders = query.getAll('decoder').flatMap((text) => text.split(','));
  if (!OFFERED_DECODERS.some((kind) => decoders.includes(kind))) return { codeIds };
  const draft = emptyDraft().decoders;
  for (const kind of OFFERED_DECODERS) draft[kind].isChosen = decoders.includes(kind);
  return { codeIds, decoders: draft };
}

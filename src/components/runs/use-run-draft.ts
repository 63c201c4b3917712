import { useEffect, useMemo, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import { emptyDraft, judgeDraft, OFFERED_DECODERS, type RunDraft } from './run-draft.ts';
import { freshSeed, proposedFramesPerShard, proposedName, proposedSweep } from './run-proposals.ts';

/** The form's state, its proposals and its verdict. A proposal gives way to what was typed. */
export function useRunDraft(codes: readonly Code[] | undefined, requirements: Requirements | null | undefined) {
  const [typed, setTyped] = useState<Partial<RunDraft>>({});
  const [base, setBase] = useState(emptyDraft);

  useEffect(() => setBase((draft) => ({ ...draft, ...prefilled(location.search), seed: freshSeed() })), []);

  const draft = useMemo(() => {
    const sweep = proposedSweep(requirements);
    const chosen = (codes ?? []).filter((code) => (typed.codeIds ?? base.codeIds).includes(code.id));
    const frames = chosen.length > 0 ? { framesPerShard: String(proposedFramesPerShard(chosen)) } : {};
    const known = codes && { codeIds: chosen.map((code) => code.id) };
    return { ...base, ...sweep, ...frames, ...typed, ...known };
  }, [base, typed, codes, requirements]);

  const name = proposedName(draft, codes ?? []);
  return {
    draft,
    name,
    judged: useMemo(() => judgeDraft(draft, name), [draft, name]),
    change: (change: Partial<RunDraft>) => setTyped((before) => ({ ...before, ...change })),
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

import { useMemo, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import type { DesignDesk } from '@/client/analyse-pool.ts';
import { CertificateBlock } from '@/components/codes/CertificateBlock.tsx';
import { InTurn } from '@/components/ui/InTurn.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { duration } from '@/components/ui/numbers.ts';
import type { OpenedDesign } from '@/core/designs/open-design.ts';
import { outlineOf } from '@/core/designs/questions/question.ts';
import { BlockList } from './BlockList.tsx';
import { type BlockGroups, disjointGroups, groupsFromClasses } from './block-groups.ts';
import { blockFrom } from './block-search.ts';
import { ClassRows } from './ClassRows.tsx';
import { DesignDrawing } from './DesignDrawing.tsx';
import { fittingDrawings } from './fitting-drawings.ts';
import { QuestionList } from './QuestionList.tsx';
import { useDesignAddress } from './use-design-address.ts';

interface Props {
  opened: OpenedDesign;
  desk: DesignDesk;
  elapsedMs: number;
  kept: Code['certificate'];
}

/** A built design: its drawing, classes, blocks, certificate, and what can be asked of it. */
export function DesignSheet({ opened, desk, elapsedMs, kept }: Props) {
  const { design } = opened;
  const { address, change } = useDesignAddress();
  const [found, setFound] = useState<Uint32Array | null>(null);
  const outline = useMemo(() => outlineOf(opened), [opened]);
  const classes = found ?? (opened.isResolved ? design.classes! : null);
  const groups = useMemo<BlockGroups | null>(() => {
    if (classes) return groupsFromClasses(classes);
    // Without a resolution, drawings tell blocks apart by groups that share no point.
    return fittingDrawings(outline, true).length > 1 ? disjointGroups(design) : null;
  }, [classes, design, outline]);
  const asked = blockFrom(address.block ?? '', design.b);
  const chosen = asked.ok ? asked.value : null;
  const shown = groups ? groupAsked(address.class, groups.count) : null;
  const shared = { design, groups, shown, chosen };
  const choose = (block: number | null) => change({ block: block === null ? '' : String(block) });
  const show = (group: number | null) => change({ class: group === null ? '' : String(group) });

  return (
    <div className="grid items-start gap-x-6 gap-y-8 wide:grid-cols-[minmax(0,1fr)_25rem]">
      <div className="grid min-w-0 gap-8">
        <p role="status" className="text-quiet">
          Built and verified in this browser in {duration(elapsedMs)}.
        </p>
        <Agreement kept={kept} opened={opened} />
        <DesignDrawing {...shared} outline={outline} address={address} change={change} onChoose={choose} />
        {groups && <ClassRows {...shared} groups={groups} onShow={show} />}
        <InTurn turn={1} className="h-120">
          <BlockList {...shared} address={address} change={change} onChoose={choose} />
        </InTurn>
      </div>
      <div className="grid min-w-0 gap-6">
        <CertificateBlock certificate={opened.certificate} />
        <QuestionList opened={opened} desk={desk} outline={outline} onClasses={setFound} />
      </div>
    </div>
  );
}

function groupAsked(text: string | undefined, count: number): number | null {
  const group = text !== undefined && /^\d{1,7}$/.test(text) ? Number(text) : null;
  return group !== null && group < count ? group : null;
}

/** The certificate kept with the code and the one made here should say the same; if not, that must be seen. */
function Agreement({ kept, opened: { certificate } }: Pick<Props, 'kept' | 'opened'>) {
  if (!certificate.holds) {
    return (
      <Notice kind="fail" word="Does not hold">
        The blocks built here fail the claim: {certificate.reason}.
      </Notice>
    );
  }
  const same = (['t', 'v', 'k', 'b', 'lambda'] as const).every((name) => !kept || kept[name] === certificate[name]);
  if (same) return null;
  return (
    <Notice kind="fail" word="Differs">
      The certificate kept with this code states other parameters than the blocks built here have.
    </Notice>
  );
}

import { lazy, Suspense, useMemo } from 'react';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import type { BlockDesign } from '@/core/designs/block-design.ts';
import { incidenceMatrix } from '@/core/designs/open-design.ts';
import type { DesignOutline } from '@/core/designs/questions/question.ts';
import type { BlockGroups } from './block-groups.ts';
import { CompleteGraph } from './CompleteGraph.tsx';
import { fittingDrawings } from './fitting-drawings.ts';
import { IncidenceDrawing } from './IncidenceDrawing.tsx';
import type { DesignAddress, DrawingKind } from './use-design-address.ts';

const MatrixPlot = lazy(() =>
  import('@/components/codes/matrix-plot/MatrixPlot.tsx').then((module) => ({ default: module.MatrixPlot })),
);

interface Props {
  design: BlockDesign;
  outline: DesignOutline;
  groups: BlockGroups | null;
  /** Group drawn alone; the others are faint. */
  shown: number | null;
  /** Block drawn heavily. */
  chosen: number | null;
  address: DesignAddress;
  change(next: { drawing?: string }): void;
  onChoose(block: number | null): void;
}

const titles: Record<DrawingKind, string> = {
  graph: 'Decomposition of the complete graph',
  incidence: 'Points and blocks',
  plot: 'Incidence plot',
};

/** The design as a picture: of those that fit its size, the most telling one unless another is asked for. */
export function DesignDrawing({ design, outline, groups, shown, chosen, address, change, onChoose }: Props) {
  const fitting = fittingDrawings(outline, groups !== null);
  const kind = address.drawing && fitting.includes(address.drawing) ? address.drawing : fitting[0]!;
  const H = useMemo(() => incidenceMatrix(design), [design]);
  return (
    <section aria-labelledby="drawing" className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-3">
      <h2 id="drawing">{titles[kind]}</h2>
      {fitting.length > 1 && (
        <ChoiceGroup
          legend="drawing"
          value={kind}
          onChange={(value) => change({ drawing: value === fitting[0] ? '' : value })}
          choices={fitting.map((value) => ({ value, label: titles[value] }))}
        />
      )}
      {kind === 'graph' && groups && (
        <CompleteGraph design={design} groups={groups} lambda={outline.lambda} shown={shown} chosen={chosen} />
      )}
      {kind === 'incidence' && groups && (
        <IncidenceDrawing design={design} groups={groups} shown={shown} chosen={chosen} onChoose={onChoose} />
      )}
      {kind === 'plot' && (
        <Suspense fallback={<p className="text-quiet">Drawing …</p>}>
          <MatrixPlot H={H} name="Incidence matrix, rows are blocks and columns points" />
        </Suspense>
      )}
    </section>
  );
}

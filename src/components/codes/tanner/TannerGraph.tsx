import { type KeyboardEvent, useEffect, useMemo, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { matrixOf } from '@/client/code-matrix.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { neighboursOf, type TannerLayout, type TannerNode, tannerLayout } from './tanner-layout.ts';

/** The Tanner graph of a small kept code: bits above, checks beneath; a chosen node shows its edges. */
export default function TannerGraph({ code }: { code: Pick<Code, 'id' | 'fingerprint'> }) {
  const [H, setH] = useState<SparseMatrix | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const { id, fingerprint } = code;
  useEffect(() => {
    let current = true;
    matrixOf({ id, fingerprint }).then(
      (matrix) => current && setH(matrix),
      (error: Error) => current && setFailure(error.message),
    );
    return () => {
      current = false;
    };
  }, [id, fingerprint]);
  if (failure)
    return (
      <Notice kind="fail" word="Not drawn" live>
        {failure}
      </Notice>
    );
  return H ? <TannerDrawing H={H} /> : <p className="text-quiet">Fetching the matrix …</p>;
}

type Chosen = Pick<TannerNode, 'kind' | 'index'>;

export function TannerDrawing({ H }: { H: SparseMatrix }) {
  const layout = useMemo(() => tannerLayout(H), [H]);
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const near = useMemo(() => (chosen ? neighboursOf(layout, chosen) : []), [layout, chosen]);
  const move = (event: KeyboardEvent) => {
    const next = nextNode(layout, chosen, event.key);
    if (!next) return;
    event.preventDefault();
    setChosen(next);
  };
  return (
    <figure className="min-w-0">
      <div className="overflow-x-auto border border-rule bg-sheet">
        <svg
          viewBox={`0 0 ${layout.width} ${layout.height}`}
          className="block w-full min-w-140"
          role="img"
          aria-label={`Tanner graph: ${H.cols} bits above, ${H.rows} checks beneath, ${H.colIndex.length} edges. Arrow keys choose a node.`}
          // biome-ignore lint/a11y/noNoninteractiveTabindex: the drawing is read node by node with the arrow keys
          tabIndex={0}
          onKeyDown={move}
          onPointerLeave={() => setChosen(null)}
        >
          <Edges layout={layout} chosen={chosen} />
          {[...layout.bits, ...layout.checks].map((node) => (
            <Node
              key={`${node.kind} ${node.index}`}
              node={node}
              state={stateOf(node, chosen, near)}
              onChoose={setChosen}
            />
          ))}
        </svg>
      </div>
      <figcaption className="mt-1.5 text-tiny" aria-live="polite">
        {chosen
          ? `${chosen.kind === 'bit' ? 'Bit' : 'Check'} ${chosen.index}: ${chosen.kind === 'bit' ? 'checks' : 'bits'} ${near.join(', ')}.`
          : 'Circles are bits, squares are checks. Point at one, or use the arrow keys, to follow its edges.'}
      </figcaption>
    </figure>
  );
}

type NodeState = 'plain' | 'chosen' | 'near' | 'far';

function stateOf(node: TannerNode, chosen: Chosen | null, near: readonly number[]): NodeState {
  if (!chosen) return 'plain';
  if (node.kind === chosen.kind) return node.index === chosen.index ? 'chosen' : 'far';
  return near.includes(node.index) ? 'near' : 'far';
}

function Edges({ layout: { bits, checks, edges }, chosen }: { layout: TannerLayout; chosen: Chosen | null }) {
  const touches = ([check, bit]: [number, number]) => chosen?.index === (chosen?.kind === 'bit' ? bit : check);
  const path = (list: readonly [number, number][]) =>
    list.map(([check, bit]) => `M${bits[bit]!.x} ${bits[bit]!.y}L${checks[check]!.x} ${checks[check]!.y}`).join('');
  return (
    <g fill="none">
      <path d={path(edges)} className="stroke-rule" strokeWidth={0.6} opacity={chosen ? 0.4 : 1} />
      {chosen && <path d={path(edges.filter(touches))} className="stroke-act" strokeWidth={1.4} />}
    </g>
  );
}

const FILL: Record<NodeState, string> = {
  plain: 'fill-sheet stroke-ink',
  chosen: 'fill-act stroke-act',
  near: 'fill-ink stroke-ink',
  far: 'fill-sheet stroke-rule',
};

function Node({ node, state, onChoose }: { node: TannerNode; state: NodeState; onChoose: (node: Chosen) => void }) {
  const { kind, index, x, y } = node;
  const shared = { className: FILL[state], strokeWidth: 1, onPointerEnter: () => onChoose({ kind, index }) };
  return kind === 'bit' ? (
    <circle cx={x} cy={y} r={4.5} {...shared} />
  ) : (
    <rect x={x - 4.2} y={y - 4.2} width={8.4} height={8.4} {...shared} />
  );
}

/** Left and right move along a line, up and down change lines. */
function nextNode({ bits, checks }: TannerLayout, chosen: Chosen | null, key: string): Chosen | null {
  const line = (kind: TannerNode['kind']) => (kind === 'bit' ? bits : checks);
  const { kind, index } = chosen ?? { kind: 'bit' as const, index: -1 };
  const count = line(kind).length;
  if (key === 'ArrowRight') return { kind, index: (index + 1) % count };
  if (key === 'ArrowLeft') return { kind, index: (Math.max(index, 0) - 1 + count) % count };
  if (key !== 'ArrowUp' && key !== 'ArrowDown') return null;
  const other = key === 'ArrowUp' ? 'bit' : 'check';
  if (other === kind) return chosen;
  const share = (Math.max(index, 0) + 0.5) / count;
  return { kind: other, index: Math.min(line(other).length - 1, Math.floor(share * line(other).length)) };
}

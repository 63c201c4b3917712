import type { BuiltCode } from '@workers/build/api.ts';
import { type ReactNode, useEffect, useRef } from 'react';
import { InTurn } from '@/components/ui/InTurn.tsx';
import { duration } from '@/components/ui/numbers.ts';
import { CertificateBlock } from '../CertificateBlock.tsx';
import { MatrixPlot } from '../matrix-plot/MatrixPlot.tsx';
import { Fingerprint, PropertiesBlock } from '../PropertiesBlock.tsx';
import { sizeText } from '../size-text.ts';
import WeightCharts from '../WeightCharts.tsx';
import type { Keepable } from './use-build.ts';

interface Props {
  built: BuiltCode;
  elapsedMs: number;
  kind: Keepable['derivation']['kind'];
  /** What can be done with it. */
  children: ReactNode;
}

/** What the build found: certificate, properties, weights, the matrix. Comes into view by itself. */
export function BuiltResult({ built, elapsedMs, kind, children }: Props) {
  const top = useRef<HTMLElement>(null);
  useEffect(() => {
    top.current?.scrollIntoView({ block: 'start', behavior: 'smooth' });
  }, []);
  const isWords = kind === 'constant-weight';
  const { n, k, H, designTitle, fingerprint, properties, certificate, rowWeights, columnWeights } = built;
  return (
    <section
      ref={top}
      aria-label="Built code"
      className="grid min-w-0 gap-6 border-ink border-t pt-5 lg:col-span-2"
      data-built-code
    >
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
        <div role="status">
          <h2>
            {sizeText({ n, k, rows: H.rows, rowWeights, kind })} {designTitle}
          </h2>
          <p className="text-quiet">
            Built and {certificate ? 'verified' : 'analysed'} in this browser in {duration(elapsedMs)}.
          </p>
        </div>
        {children}
      </div>
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <InTurn turn={1} className="h-96">
          <PropertiesBlock
            title="Properties"
            showTitle
            properties={properties}
            after={[{ label: 'Fingerprint', value: <Fingerprint hex={fingerprint} /> }]}
          />
        </InTurn>
        <div className="grid gap-6">
          <CertificateBlock certificate={certificate} />
          <InTurn turn={2} className="h-6">
            <WeightCharts rowWeights={rowWeights} columnWeights={columnWeights} />
          </InTurn>
        </div>
      </div>
      <div>
        <h2 className="mb-2">{isWords ? 'Words' : 'Matrix'}</h2>
        <InTurn turn={3} className="aspect-square max-h-168">
          <MatrixPlot H={H} name={isWords ? 'Words, one a row' : undefined} />
        </InTurn>
      </div>
    </section>
  );
}

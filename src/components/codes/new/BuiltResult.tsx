import type { BuiltCode } from '@workers/build/api.ts';
import { duration, wholeNumber } from '@/components/ui/numbers.ts';
import { CertificateBlock } from '../CertificateBlock.tsx';
import { MatrixPlot } from '../matrix-plot/MatrixPlot.tsx';
import { Fingerprint, PropertiesBlock } from '../PropertiesBlock.tsx';
import WeightCharts from '../WeightCharts.tsx';

/** What the build found: certificate, properties, weights, the matrix. */
export function BuiltResult({ built, elapsedMs }: { built: BuiltCode; elapsedMs: number }) {
  const { n, k, designTitle, fingerprint, properties, certificate, rowWeights, columnWeights } = built;
  return (
    <section aria-label="Built code" className="grid gap-6" data-built-code>
      <div role="status">
        <h2>
          ({wholeNumber(n)}, {wholeNumber(k)}) {designTitle}
        </h2>
        <p className="text-quiet">Built and verified in this browser in {duration(elapsedMs)}.</p>
      </div>
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <PropertiesBlock
          title="Properties"
          showTitle
          properties={properties}
          after={[{ label: 'Fingerprint', value: <Fingerprint hex={fingerprint} /> }]}
        />
        <div className="grid gap-6">
          <CertificateBlock certificate={certificate} />
          <WeightCharts rowWeights={rowWeights} columnWeights={columnWeights} />
        </div>
      </div>
      <div>
        <h2 className="mb-2">Matrix</h2>
        <MatrixPlot H={built.H} />
      </div>
    </section>
  );
}

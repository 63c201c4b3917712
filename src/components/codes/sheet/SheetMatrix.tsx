import { useCallback, useEffect, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { matrixOf } from '@/client/code-matrix.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { MatrixPlot } from '../matrix-plot/MatrixPlot.tsx';

interface Props {
  code: Pick<Code, 'id' | 'fingerprint'>;
  /** Where the plot begins, from the address. */
  start: string | null;
  /** What is drawn, for those who cannot see it. */
  name?: string;
}

/** The matrix of a kept code: fetched, held against its fingerprint, drawn; the address follows the zoom. */
export default function SheetMatrix({ code, start, name }: Props) {
  const [H, setH] = useState<SparseMatrix | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [tries, setTries] = useState(0);
  const { id, fingerprint } = code;

  // biome-ignore lint/correctness/useExhaustiveDependencies: a new try runs the effect again
  useEffect(() => {
    let current = true;
    setFailure(null);
    matrixOf({ id, fingerprint }).then(
      (matrix) => current && setH(matrix),
      (error: Error) => current && setFailure(error.message),
    );
    return () => {
      current = false;
    };
  }, [id, fingerprint, tries]);

  const onView = useCallback((text: string | null) => {
    const url = new URL(location.href);
    if (text === null) url.searchParams.delete('view');
    else url.searchParams.set('view', text);
    history.replaceState(history.state, '', url);
  }, []);

  if (failure) {
    return (
      <Notice
        kind="fail"
        word="Not drawn"
        live
        action={
          <Button size="small" onClick={() => setTries((n) => n + 1)}>
            Try again
          </Button>
        }
      >
        {failure}
      </Notice>
    );
  }
  if (!H) return <p className="text-quiet">Fetching the matrix …</p>;
  return <MatrixPlot H={H} name={name} start={start} onView={onView} />;
}

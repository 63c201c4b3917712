import type { Point } from '@/api/runs.ts';
import { decoderName } from '@/client/curves/decoder-text.ts';
import { useKernels } from '@/client/use-kernels.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { kernelSentences } from './kernel-sentences.ts';

interface Props {
  points: readonly Point[];
  /** Whether this page works on the run: nothing is found out before. */
  isWorkedOn: boolean;
}

/** Which path the frames take in this browser; loud where it is not the fast one, with the reason. */
export function KernelNote({ points, isWorkedOn }: Props) {
  const kernels = useKernels(points, isWorkedOn);
  if (!kernels || kernels.length === 0) return null;
  const slow = kernels.filter(({ kernel }) => kernel !== 'wasm');
  if (slow.length === 0)
    return <p className="text-quiet text-tiny">Decoded by WebAssembly SIMD kernels made for each matrix.</p>;
  return (
    <Notice kind="caution" word="Not at full speed">
      {kernelSentences(slow.map(({ point, reason }) => ({ name: decoderName(point.decoder), reason }))).join(' ')} The
      figures are the same.
    </Notice>
  );
}

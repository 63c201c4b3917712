import { deriveLdpc } from '../../src/core/codes/ldpc.ts';
import type { SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '../../src/core/decoders/decoder-spec.ts';
import { puncturedAffinePlane } from '../../src/core/designs/families/punctured-affine-plane.ts';
import { runShard } from '../../src/core/simulation/shard.ts';
import { simulatedCodes } from './simulated-codes.ts';
import rates from './simulated-rates.json' with { type: 'json' };

export type ReferencePoint = (typeof rates.points)[number];
export const referencePoints: readonly ReferencePoint[] = rates.points;

/** Names of the independent program, in ours. */
export const referenceDecoders: Record<string, DecoderSpec> = {
  OSMLD: { kind: 'majority-logic' },
  GA: { kind: 'gallager-a', iterations: 20 },
  GB: { kind: 'gallager-b', iterations: 20 },
  SPA: { kind: 'sum-product', iterations: 50 },
};

export function matrixOf(point: ReferencePoint): SparseMatrix {
  if (point.code === 'eg16') return deriveLdpc(puncturedAffinePlane.build({ q: 16 }), { checks: 'blocks' }).H;
  return simulatedCodes[point.code]!();
}

/** How far our rates are from the reference, in standard errors of the difference, from that many frames. */
export async function deviations(point: ReferencePoint, frames: number, kernel: 'reference' | 'wasm') {
  const H = matrixOf(point);
  const tally = await runShard(
    {
      H,
      channel: { kind: 'bsc', p: point.p },
      decoder: referenceDecoders[point.decoder]!,
      seed: point.id,
      framesPerShard: frames,
    },
    0,
    kernel,
  );
  const fer = tally.frameErrors / frames;
  // The reference's own rate gives the spread, so that a short run without failures is judged too.
  const ferSpread = Math.hypot(Math.sqrt((point.fer * (1 - point.fer)) / frames), point.ferStandardError);
  const scale = point.frames / frames;
  const berSpread = point.berStandardError * Math.sqrt(1 + scale);
  return {
    fer: (fer - point.fer) / ferSpread,
    ber: (tally.bitErrors / (frames * H.cols) - point.ber) / berSpread,
  };
}

import type { Point } from '@/api/runs.ts';
import { type Curve, curvePointOf } from './curve.ts';
import { decoderKey } from './decoder-text.ts';

/** Names a curve in addresses: run, code and decoder with its parameters; weight strata are a curve of their own. */
export const curveKey = (point: Pick<Point, 'runId' | 'codeId' | 'decoder' | 'channel'>): string =>
  `${point.runId}~${point.codeId}~${decoderKey(point.decoder)}${point.channel.kind === 'stratum' ? '~strata' : ''}`;

/** Sorts points into curves. Points of different runs are never joined: two runs may share a seed, and then adding
 *  them would count the same frames twice. Curves come in the order their first point came; a curve whose points have
 *  no frames yet is there, empty, so that its line pattern does not change when the first shard lands. Weight strata
 *  are no points of a curve; they are left to `stratumGroups`. */
export function groupPoints(points: readonly Point[]): Curve[] {
  const curves = new Map<string, Curve>();
  for (const point of points) {
    if (point.channel.kind === 'stratum') continue;
    const key = curveKey(point);
    let curve = curves.get(key);
    if (curve === undefined) {
      const { runId, codeId, codeLabel, n, k, decoder } = point;
      curve = { key, runId, codeId, codeLabel, n, k, decoder, points: [] };
      curves.set(key, curve);
    }
    const measured = curvePointOf(point);
    if (measured !== null) curve.points.push(measured);
  }
  for (const curve of curves.values()) curve.points.sort((a, b) => b.p - a.p);
  return [...curves.values()];
}

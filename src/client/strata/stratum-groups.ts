import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { countedStrata, isStratum } from '@/core/simulation/known-strata.ts';
import { curveKey } from '../curves/group-points.ts';

/** The weights of one code under one decoder in one run: what a combined curve is made of. */
export interface StratumGroup {
  key: string;
  runId: string;
  codeId: string;
  codeLabel: string;
  n: number;
  k: number;
  decoder: DecoderSpec;
  level: number;
  /** By weight, ascending, each weight once. */
  points: Point[];
}

/** Sorts the stratum points of runs into groups, in the order their first points came; each group has the points that
 *  count of each weight. */
export function stratumGroups(points: readonly Point[]): StratumGroup[] {
  const groups = new Map<string, StratumGroup>();
  for (const point of points) {
    if (!isStratum(point)) continue;
    const key = curveKey(point);
    const group = groups.get(key);
    const { runId, codeId, codeLabel, n, k, decoder, level } = point;
    if (group) group.points.push(point);
    else groups.set(key, { key, runId, codeId, codeLabel, n, k, decoder, level, points: [point] });
  }
  return [...groups.values()]
    .map((group) => ({ ...group, points: countedStrata(group.points) }))
    .filter((group) => group.points.length > 0);
}

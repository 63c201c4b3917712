import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
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

export const isStratum = (point: Pick<Point, 'channel'>): boolean => point.channel.kind === 'stratum';

export const weightOf = (point: Pick<Point, 'channel'>): number =>
  point.channel.kind === 'stratum' ? point.channel.weight : Number.NaN;

/** Sorts the stratum points of runs into groups, in the order their first points came. Where a run was planned in stages
 *  the pilot's frames are left out, which only planned, and of the later stages a weight counts its last. */
export function stratumGroups(points: readonly Point[]): StratumGroup[] {
  const groups = new Map<string, StratumGroup>();
  for (const point of points) {
    if (!isStratum(point) || stageOf(point) === 0) continue;
    const key = curveKey(point);
    let group = groups.get(key);
    if (group === undefined) {
      const { runId, codeId, codeLabel, n, k, decoder, level } = point;
      group = { key, runId, codeId, codeLabel, n, k, decoder, level, points: [] };
      groups.set(key, group);
    }
    const twin = group.points.findIndex((other) => weightOf(other) === weightOf(point));
    if (twin < 0) group.points.push(point);
    else if (stageOf(point) > stageOf(group.points[twin]!)) group.points[twin] = point;
  }
  for (const group of groups.values()) group.points.sort((a, b) => weightOf(a) - weightOf(b));
  return [...groups.values()];
}

/** Points that were stated by hand count as they are. */
const stageOf = (point: Point): number => point.plan?.stage ?? 1;

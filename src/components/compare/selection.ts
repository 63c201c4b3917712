import type { Run } from '@/api/runs.ts';
import type { Curve } from '@/client/curves/curve.ts';

const SEPARATOR = ',';

export const selectionText = (keys: readonly string[]): string => keys.join(SEPARATOR);

/** The curves to overlay, in the order they were chosen: those the address names; else those of the run it names; else
 *  those of the newest run that has points. Names of curves that are gone are passed over. */
export function selectedCurves(
  curves: readonly Curve[],
  runs: readonly Run[],
  address: { curves: string | null; run: string | null },
): Curve[] {
  if (address.curves !== null) {
    const byKey = new Map(curves.map((curve) => [curve.key, curve]));
    return address.curves.split(SEPARATOR).flatMap((key) => byKey.get(key) ?? []);
  }
  const ofRun = (id: string) => curves.filter((curve) => curve.runId === id);
  if (address.run !== null) return ofRun(address.run);
  const newest = [...runs]
    .sort((a, b) => (a.createdAt < b.createdAt ? 1 : -1))
    .find((run) => curves.some((curve) => curve.runId === run.id));
  return newest ? ofRun(newest.id) : [];
}

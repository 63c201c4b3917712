import type { Run } from '@/api/runs.ts';
import { wholeNumber } from '../ui/numbers.ts';

/** Where a chart's points are from, so that each can be computed again: "Computed by Blockwright: run “Sweep”, seed
 *  “a”, 20 000 frames a shard." */
export function runsText(runs: readonly Pick<Run, 'name' | 'seed' | 'framesPerShard'>[]): string {
  if (runs.length === 0) return 'Drawn by Blockwright.';
  const list = runs.map(
    ({ name, seed, framesPerShard }) => `run “${name}”, seed “${seed}”, ${wholeNumber(framesPerShard)} frames a shard`,
  );
  return `Computed by Blockwright: ${list.join('; ')}.`;
}

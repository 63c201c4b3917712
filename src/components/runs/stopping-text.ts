import type { Stopping } from '@/api/runs.ts';
import { counted, duration, scientific } from '@/components/ui/numbers.ts';

/** The rules by which a point ends, the cap on frames last: "100 frame errors", "1 000 000 frames". */
export function stoppingRules({ frameErrors, maxFrames, width, verdict, seconds }: Stopping): string[] {
  const rules: string[] = [];
  if (verdict)
    rules.push(`the verdict on FER ${scientific(verdict.limit, 3)}, wrong with ${percent(verdict.falsePass)}`);
  if (frameErrors !== undefined) rules.push(counted(frameErrors, 'frame error'));
  if (width) rules.push(`limits within a factor of ${width.factor} at ${percent(width.level)}`);
  if (seconds !== undefined) rules.push(`${duration(seconds * 1000)} of work`);
  return [...rules, counted(maxFrames, 'frame')];
}

const percent = (share: number): string => `${Number((share * 100).toPrecision(4))}\u202f%`;

import type { Goal, Outcome } from '@/api/runs.ts';
import { counted } from '@/components/ui/numbers.ts';
import { levelText, parameterText, scientific } from '../charts/rate-text.ts';

/** "UBER ≤ 10⁻¹⁵ at p = 0.001, shown at 95 %"; "1 curve from p = 0.02 down to 0.004, at most 12 points each". */
export function goalText(goal: Goal): string {
  if (goal.kind === 'limit') {
    const { rate, target, p, level } = goal;
    const digits = target.toExponential().split('e')[0]!.replace('.', '').length;
    return `${rate.toUpperCase()} ≤ ${scientific(target, digits)} at p = ${parameterText(p)}, shown at ${levelText(level)}`;
  }
  const { curves, from, to, points } = goal;
  const span = `from p = ${parameterText(from)} down to ${parameterText(to)}`;
  return `${counted(curves.length, 'curve')} ${span}, at most ${counted(points, 'point')} each`;
}

export const VERDICT_WORD: Record<Outcome['verdict'], string> = {
  pass: 'Kept',
  fail: 'Not kept',
  open: 'Left open',
  complete: 'Complete',
};

import { Button } from '@/components/ui/Button.tsx';
import { Progress } from '@/components/ui/Progress.tsx';
import type { SheetStep } from '@/core/codes/sheet.ts';
import { RefusalNotice } from '../RefusalNotice.tsx';
import type { BuildState } from './use-build.ts';

interface Props {
  build: BuildState;
  /** Nothing to build while the parameters are refused. */
  allowed: boolean;
  onStart: () => void;
  onCancel: () => void;
}

const STEPS: Record<SheetStep, { at: number; text: string }> = {
  build: { at: 0.1, text: 'building the blocks' },
  verify: { at: 0.35, text: 'verifying: counting how often points meet' },
  derive: { at: 0.6, text: 'deriving the matrix' },
  analyse: { at: 0.75, text: 'rank, girth and weights' },
};

/** The build button, and while it works its step and a way out. */
export function BuildControls({ build, allowed, onStart, onCancel }: Props) {
  if (build.state === 'working') {
    const step = build.step && STEPS[build.step];
    return (
      <div className="grid gap-3">
        <Progress label="Building the code" value={step?.at ?? null} left={step?.text ?? 'starting a worker'} />
        <Button onClick={onCancel}>Cancel</Button>
      </div>
    );
  }
  return (
    <div className="grid gap-3">
      {build.state === 'refused' && <RefusalNotice refusal={build.refusal} />}
      {build.state !== 'built' && (
        <Button kind="primary" disabled={!allowed} onClick={onStart}>
          Build and verify
        </Button>
      )}
    </div>
  );
}

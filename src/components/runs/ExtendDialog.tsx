import { useState } from 'react';
import type { Run } from '@/api/runs.ts';
import type { ApiFailure } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Dialog } from '@/components/ui/Dialog.tsx';
import { NumberField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { numberOf } from './number-of.ts';

interface Props {
  run: Run;
  isBusy: boolean;
  failure: ApiFailure | null;
  onClose: () => void;
  onExtend: (extension: { frameErrors?: number; maxFrames?: number }) => void;
}

/** Asks for more frame errors or frames; every shard there is counts on. */
export function ExtendDialog({ run: { stopping }, isBusy, failure, onClose, onExtend }: Props) {
  const [errorsText, setErrorsText] = useState(stopping.frameErrors === undefined ? '' : String(stopping.frameErrors));
  const [framesText, setFramesText] = useState(String(stopping.maxFrames));
  const [frameErrors, maxFrames] = [numberOf(errorsText), numberOf(framesText)];
  const errors = {
    frameErrors:
      stopping.frameErrors === undefined || atLeast(frameErrors, stopping.frameErrors, 1e6)
        ? null
        : `a whole number from ${wholeNumber(stopping.frameErrors)} to ${wholeNumber(1e6)}`,
    maxFrames: atLeast(maxFrames, stopping.maxFrames, 1e12)
      ? null
      : `a whole number from ${wholeNumber(stopping.maxFrames)} to ${wholeNumber(1e12)}`,
  };
  const extension = {
    ...(stopping.frameErrors !== undefined && frameErrors > stopping.frameErrors && { frameErrors }),
    ...(maxFrames > stopping.maxFrames && { maxFrames }),
  };
  return (
    <Dialog
      title="Extend this run"
      open
      onClose={onClose}
      actions={
        <>
          <Button kind="quiet" onClick={onClose}>
            As it is
          </Button>
          <Button
            kind="primary"
            busy={isBusy}
            disabled={Object.keys(extension).length === 0 || errors.frameErrors !== null || errors.maxFrames !== null}
            onClick={() => onExtend(extension)}
          >
            Extend
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <p>Points that were done go on from the shards they have, up to the new figures.</p>
        {stopping.frameErrors !== undefined && (
          <NumberField
            label="A point ends at frame errors"
            value={errorsText}
            error={errors.frameErrors}
            onChange={(event) => setErrorsText(event.target.value)}
          />
        )}
        <NumberField
          label="or at frames"
          value={framesText}
          error={errors.maxFrames}
          onChange={(event) => setFramesText(event.target.value)}
        />
        {failure && (
          <Notice kind="fail" word="Refused" live>
            {failure.message}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}

const atLeast = (value: number, least: number, most: number): boolean =>
  Number.isInteger(value) && value >= least && value <= most;

import { useRef, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { type CalibrationRequest, calibrateInWorker } from '@/client/calibrate-pool.ts';
import { decoderDetail } from '@/client/curves/decoder-text.ts';
import { Button } from '@/components/ui/Button.tsx';
import { NumberField, SelectField } from '@/components/ui/fields.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Calibration } from '@/core/simulation/calibrate.ts';
import { binomialInterval } from '@/core/statistics/binomial-interval.ts';
import { Figure } from '../charts/Figure.tsx';
import { intervalText, parameterText, rateText } from '../charts/rate-text.ts';
import { numberOf } from './number-of.ts';

interface Props {
  codes: readonly Code[];
  /** The decoder as it stands in the form; null while something in it is not accepted. */
  decoder: DecoderSpec;
  /** Where some per cent of the frames fail, as far as the form knows. */
  p: string;
  onTake: (decoder: DecoderSpec) => void;
}

const LEVEL = 0.99;
const SEED = 'calibration';
const SHOWN = 4;

interface Found {
  calibration: Calibration;
  code: Code;
  p: number;
}

/** Finds a decoder's settings on one short seeded shard each. */
export function Calibrate({ codes, decoder, ...given }: Props) {
  const [p, setP] = useState<string | null>(null);
  const [frames, setFrames] = useState('2000');
  const [codeId, setCodeId] = useState<string | null>(null);
  const trial = useTrial();
  const code = codes.find(({ id }) => id === codeId) ?? codes[0];
  const [crossover, count] = [numberOf(p ?? given.p), numberOf(frames)];
  const errors = {
    p: crossover > 0 && crossover <= 0.5 ? undefined : 'a crossover probability above 0 and at most 0.5',
    frames:
      Number.isInteger(count) && count >= 100 && count <= 1e6 ? undefined : 'a whole number from 100 to 1 000 000',
  };
  const begin = () => {
    if (!code || errors.p || errors.frames) return;
    const channel = { kind: 'bsc' as const, p: crossover };
    void trial.begin(code, { channel, decoder, seed: SEED, frames: count });
  };
  return (
    <details className="mt-2 pl-6">
      <summary className="cursor-pointer text-act">Find the settings by trial</summary>
      <div className="mt-2 grid gap-3">
        {!code && <p className="text-quiet text-tiny">Choose a code first.</p>}
        <div className="grid gap-4 sm:grid-cols-3">
          {codes.length > 1 && (
            <SelectField
              label="On the code"
              value={code?.id ?? ''}
              choices={codes.map(({ id, name }) => ({ value: id, label: name }))}
              onChange={(event) => setCodeId(event.target.value)}
            />
          )}
          <NumberField
            label="At p"
            value={p ?? given.p}
            error={errors.p}
            hint="where some per cent of the frames fail"
            onChange={(event) => setP(event.target.value)}
          />
          <NumberField
            label="Frames a setting"
            value={frames}
            error={errors.frames}
            hint="the same frames for each"
            onChange={(event) => setFrames(event.target.value)}
          />
        </div>
        {trial.progress ? (
          <Running {...trial.progress} onCancel={trial.cancel} />
        ) : (
          <div>
            <Button size="small" disabled={!code || Boolean(errors.p ?? errors.frames)} onClick={begin}>
              Try the settings
            </Button>
          </div>
        )}
        {trial.failure && (
          <Notice kind="fail" word="Not tried" live>
            {trial.failure}
          </Notice>
        )}
        {trial.found && <Result {...trial.found} onTake={given.onTake} />}
      </div>
    </details>
  );
}

function useTrial() {
  const [progress, setProgress] = useState<{ done: number; all: number } | null>(null);
  const [found, setFound] = useState<Found | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const abort = useRef<AbortController | null>(null);
  const begin = async (code: Code, request: CalibrationRequest & { channel: { kind: 'bsc'; p: number } }) => {
    abort.current = new AbortController();
    const { signal } = abort.current;
    setFound(null);
    setFailure(null);
    setProgress({ done: 0, all: 0 });
    try {
      const onTrial = (done: number, all: number) => !signal.aborted && setProgress({ done, all });
      const calibration = await calibrateInWorker(code, request, { signal, onTrial });
      setFound({ calibration, code, p: request.channel.p });
    } catch (error) {
      if (!signal.aborted) setFailure((error as Error).message);
    }
    setProgress(null);
  };
  return { progress, found, failure, begin, cancel: () => abort.current?.abort() };
}

function Running({ done, all, onCancel }: { done: number; all: number; onCancel: () => void }) {
  return (
    <div className="grid gap-2" role="status">
      <Progress
        label="Settings tried"
        value={all === 0 ? null : done / all}
        left={all === 0 ? 'the first setting is being tried' : `${done} of ${counted(all, 'setting')} tried`}
      />
      <div>
        <Button size="small" onClick={onCancel}>
          Cancel
        </Button>
      </div>
    </div>
  );
}

function Result({ calibration, code, p, onTake }: Found & Pick<Props, 'onTake'>) {
  const { trials, decoder } = calibration;
  const frames = trials[0]!.tally.frames;
  return (
    <div className="grid gap-2 border border-rule bg-sheet px-3 py-2" role="status">
      <p>
        Fewest failures on {code.name} at p = {parameterText(p)}:{' '}
        <span className="font-semibold">{decoderDetail(decoder)}</span>
      </p>
      <ul className="grid gap-1 text-tiny">
        {trials.slice(0, SHOWN).map((tried) => (
          <li key={decoderDetail(tried.decoder)} className="flex flex-wrap items-baseline gap-x-3">
            <span>{decoderDetail(tried.decoder)}</span>
            <span className="font-mono">
              <Figure text={shareText(tried.tally.frameErrors, frames)} />
            </span>
          </li>
        ))}
      </ul>
      <p className="flex flex-wrap items-baseline gap-x-3 text-quiet text-tiny">
        <Grade grade="sampled" method={`${wholeNumber(frames)} frames a setting, seed ${SEED}`} />
        FER, 99 % Clopper–Pearson each; best of {counted(trials.length, 'setting')} on the same{' '}
        {counted(frames, 'frame')}: likely, not certain, to be the best of a long run.
      </p>
      <div>
        <Button kind="primary" size="small" onClick={() => onTake(decoder)}>
          Take these settings
        </Button>
      </div>
    </div>
  );
}

function shareText(errors: number, frames: number): string {
  const rate = { value: errors === 0 ? null : errors / frames, ...binomialInterval(errors, frames, LEVEL) };
  return errors === 0 ? rateText(rate) : `${rateText(rate)}  ${intervalText(rate)}`;
}

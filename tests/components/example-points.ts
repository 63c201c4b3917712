import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

interface ExampleOptions {
  id?: string;
  runId?: string;
  codeId?: string;
  p?: number;
  n?: number;
  k?: number;
  decoder?: DecoderSpec;
  frames?: number;
  frameErrors?: number;
  done?: boolean;
}

/** A point with a tally of plausible shape for showing; its intervals are rough, as only their order matters here. */
export function examplePoint(options: ExampleOptions): Point {
  const { p = 0.02, n = 273, k = 191, frames = 10_000, frameErrors = 500 } = options;
  const bitErrors = frameErrors * 20;
  const bits = frames * n;
  const spread = 2.6 * Math.sqrt(Math.max(frameErrors, 1));
  const limits = (errors: number, trials: number, scale: number) => ({
    lower: errors === 0 ? 0 : Math.max((errors - spread * scale) / trials, errors / trials / 50),
    upper: trials === 0 ? 1 : Math.min(1, errors === 0 ? 4.6 / trials : (errors + (spread + 1) * scale) / trials),
  });
  return {
    id: options.id ?? `point-${p}`,
    runId: options.runId ?? 'run-1',
    codeId: options.codeId ?? 'code-1',
    codeLabel: `(${n},${k}) projective plane, q = 16`,
    n,
    k,
    channel: { kind: 'bsc', p },
    decoder: options.decoder ?? { kind: 'gallager-b', iterations: 20 },
    tally: {
      frames,
      frameErrors,
      bitErrors,
      bitErrorsSquared: frameErrors * 400,
      undetected: Math.floor(frameErrors / 100),
      iterations: frames * 2,
      bits,
      iterationHistogram: frames === 0 ? [] : [0, 0, frames],
    },
    nextIndex: 1,
    extra: [],
    stopReason: null,
    stopped: null,
    recomputed: 0,
    setAside: 0,
    plan: null,
    done: options.done ?? false,
    fer: frames === 0 ? 0 : frameErrors / frames,
    ber: bits === 0 ? 0 : bitErrors / bits,
    interval: limits(frameErrors, frames, 1),
    berInterval: limits(bitErrors, bits, 20),
    level: 0.99,
  };
}

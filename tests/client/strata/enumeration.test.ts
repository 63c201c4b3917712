import { afterEach, describe, expect, it, vi } from 'vitest';
import { enumerateWeight, patternCount } from '@/client/strata/enumeration.ts';
import { isWhole, wholeStrata, withPart } from '@/client/strata/enumeration-store.ts';
import { buildDesign, deriveLdpc } from '@/core/index.ts';
import { enumerateStratum } from '@/core/simulation/enumerate-stratum.ts';

const { H } = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 4 } }), { checks: 'blocks' });
const spec = {
  H,
  channel: { kind: 'bsc' as const, p: 0.01 },
  decoder: { kind: 'bit-flipping' as const },
  seed: '',
  framesPerShard: 1,
};
const code = { id: 'c1', fingerprint: 'f'.repeat(64) };

/** A browser's store and events, of which the enumeration needs no more. */
function browser() {
  const kept = new Map<string, string>();
  vi.stubGlobal('localStorage', {
    getItem: (key: string) => kept.get(key) ?? null,
    setItem: (key: string, text: string) => kept.set(key, text),
  });
  vi.stubGlobal('window', new EventTarget());
  return kept;
}

type Part = typeof import('@/client/strata/strata-pool.ts').enumeratePart;
const inPlace: Part = async (_code, _decoder, weight, range) => ({
  value: await enumerateStratum(spec, weight, range),
  elapsedMs: 1,
});

describe('the enumeration of a weight in parts', () => {
  afterEach(() => vi.unstubAllGlobals());

  it('comes to the counts of the whole', async () => {
    browser();
    const whole = await enumerateStratum(spec, 4);
    const progress = await enumerateWeight(code, spec.decoder, 4, new AbortController().signal, inPlace);
    expect(isWhole(progress)).toBe(true);
    expect(progress.tally.frames).toBe(patternCount(21, 4));
    expect(progress.tally.frameErrors).toBe(whole.frameErrors);
    expect(progress.representatives).toBe(whole.representatives);
    expect(wholeStrata([progress]).get(4)).toMatchObject({ grade: 'computed', frames: 5985 });
  });

  it('goes on from where it was cancelled, and repeats no branch', async () => {
    browser();
    const ranges: { from: number; to: number }[] = [];
    const abort = new AbortController();
    const cancelled: Part = async (...call) => {
      if (ranges.length === 2) throw new DOMException('cancelled', 'AbortError');
      ranges.push(call[3]);
      return { ...(await inPlace(...call)), elapsedMs: 4000 };
    };
    await expect(enumerateWeight(code, spec.decoder, 5, abort.signal, cancelled)).rejects.toThrow('cancelled');
    const going: Part = async (...call) => {
      ranges.push(call[3]);
      return inPlace(...call);
    };
    const progress = await enumerateWeight(code, spec.decoder, 5, abort.signal, going);
    for (const [i, { from }] of ranges.entries()) expect(from).toBe(ranges[i - 1]?.to ?? 0);
    expect(progress.tally.frames).toBe(patternCount(21, 5));
  });

  it('refuses sums that would no longer be exact', () => {
    const tally = {
      frames: 1,
      frameErrors: 0,
      bitErrors: 0,
      bitErrorsSquared: 0,
      undetected: 0,
      iterations: 0,
      bits: 2 ** 53 - 1,
      iterationHistogram: [1],
    };
    const part = { weight: 3, branches: 4, representatives: 1, symmetryOrder: 1, elapsedMs: 1, tally };
    const before = withPart(undefined, { ...part, to: 1 });
    expect(() => withPart(before, { ...part, to: 2 })).toThrow('2^53');
  });
});

import { describe, expect, it } from 'vitest';
import { decoderCost } from '@/components/runs/decoder-cost.ts';
import { estimatorRows } from '@/components/runs/estimator-rows.ts';
import { kernelSentences } from '@/components/runs/kernel-sentences.ts';
import { examplePoint } from '../example-points.ts';

const labels = (rows: ReturnType<typeof estimatorRows>) => rows.map(({ label }) => label);

describe('the estimates of a point', () => {
  it('give the plain share, and the one for stopping on errors beside it', () => {
    const point = { ...examplePoint({}), stopped: { estimate: 0.0499, lower: 0.044, upper: 0.056 } };
    const rows = estimatorRows(point, 4641);
    expect(labels(rows).slice(0, 2)).toEqual(['FER, errors over frames', 'FER, stopped on errors']);
    expect(rows[1]!.note).toContain('Haldane 1945');
    expect(rows.every(({ grade }) => grade === 'sampled')).toBe(true);
  });

  it('bound an undetected rate of which nothing was seen', () => {
    const undetected = estimatorRows(examplePoint({ frameErrors: 3 }), null).find(
      ({ label }) => label === 'Undetected',
    );
    expect(undetected!.text).toMatch(/^</);
    // 1 − 0.01^(1/10⁴), rounded up: one-sided at 99 %, as the frame error rate of a point without errors is.
    expect(undetected!.text).toContain('4.61');
  });

  it('count the edges that a frame visits, once the edges are known', () => {
    const point = examplePoint({ decoder: { kind: 'bit-flipping' } });
    // Two iterations of two visits, and three syndrome tests, to each of 4641 edges.
    expect(estimatorRows(point, 4641).at(-1)!.text.replace(/\D/g, '')).toBe(String(7 * 4641));
    expect(labels(estimatorRows(point, null))).not.toContain('Edge updates a frame');
  });

  it('are none without frames', () => {
    expect(estimatorRows(examplePoint({ frames: 0, frameErrors: 0 }), 1)).toEqual([]);
  });
});

describe('the path of the frames', () => {
  it('is told once a reason', () => {
    const reason = 'this engine has no WebAssembly SIMD: 32 frames at a time in TypeScript';
    const kernels = ['Gallager B', 'bit flipping'].map((name) => ({ name, reason }));
    expect(kernelSentences(kernels)).toEqual([`Gallager B, bit flipping: ${reason}.`]);
  });
});

describe('what a decoder costs', () => {
  it('is told a bit and iteration, in all for the codes chosen', () => {
    const codes = [
      { n: 273, ones: 4641 },
      { n: 1023, ones: 32736 },
    ];
    expect(decoderCost('bit-flipping', [])).toContain('3 edge updates for each of the bit’s checks; one is one excl');
    expect(decoderCost('bit-flipping', codes)).toContain('checks, so 51 or 96 for the codes chosen;');
  });
});

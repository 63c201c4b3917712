import { describe, expect, it } from 'vitest';
import { curveLabels } from '@/client/curves/curve-labels.ts';
import { decoderKey, decoderText } from '@/client/curves/decoder-text.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { logSweep, parseList } from '@/client/curves/sweep.ts';
import { uncodedRate } from '@/client/curves/uncoded.ts';
import { examplePoint } from '../../components/example-points.ts';

describe('points grouped into curves', () => {
  it('go by run, code and decoder, worst channel first', () => {
    const curves = groupPoints([
      examplePoint({ id: 'a', p: 0.01 }),
      examplePoint({ id: 'b', p: 0.03 }),
      examplePoint({ id: 'c', p: 0.03, decoder: { kind: 'majority-logic' } }),
      examplePoint({ id: 'd', p: 0.03, runId: 'other' }),
    ]);
    expect(curves.map((curve) => curve.points.map((point) => point.pointId))).toEqual([['b', 'a'], ['c'], ['d']]);
  });

  it('keep an empty curve for points without frames, so that patterns stay put', () => {
    const [curve] = groupPoints([examplePoint({ frames: 0, frameErrors: 0 })]);
    expect(curve?.points).toEqual([]);
  });

  it('have no value where no error was seen', () => {
    const [curve] = groupPoints([examplePoint({ frames: 1000, frameErrors: 0 })]);
    expect(curve?.points[0]?.fer.value).toBeNull();
    expect(curve?.points[0]?.fer.upper).toBeGreaterThan(0);
  });

  it('have the same key whatever the order of the parameters', () => {
    expect(decoderKey({ kind: 'gallager-b', iterations: 20, threshold: 9 })).toBe(
      decoderKey({ threshold: 9, iterations: 20, kind: 'gallager-b' }),
    );
  });
});

describe('end labels', () => {
  it('are short where that tells the curves apart', () => {
    const curves = groupPoints([
      examplePoint({}),
      examplePoint({ decoder: { kind: 'majority-logic' } }),
      examplePoint({ decoder: { kind: 'sum-product', iterations: 50 } }),
    ]);
    expect(curveLabels(curves)).toEqual(['(273,191) Gallager B', '(273,191) one-step', '(273,191) sum-product']);
  });

  it('say what differs where the short ones would agree', () => {
    const curves = groupPoints([
      examplePoint({}),
      examplePoint({ decoder: { kind: 'gallager-b', iterations: 50 } }),
      examplePoint({ runId: 'second' }),
    ]);
    const labels = curveLabels(curves, (id) => (id === 'second' ? 'longer run' : 'first run'));
    expect(new Set(labels).size).toBe(3);
    expect(labels[1]).toContain('50 iterations');
    expect(labels[2]).toContain('longer run');
  });
});

describe('decoders in words', () => {
  it('name their parameters', () => {
    expect(decoderText({ kind: 'gallager-b', iterations: 20, threshold: 9 })).toBe(
      'Gallager B, 20 iterations, threshold 9',
    );
    expect(decoderText({ kind: 'majority-logic' })).toBe('one-step majority logic');
  });
});

describe('a sweep', () => {
  it('has both ends and even steps on the logarithmic axis', () => {
    const points = logSweep(0.05, 0.005, 5);
    expect(points).toHaveLength(5);
    expect(points[0]).toBe(0.05);
    expect(points[4]).toBe(0.005);
    for (let i = 1; i < 5; i++) expect(points[i]! / points[i - 1]!).toBeCloseTo(10 ** -0.25, 3);
  });

  it('given as a list tells back what is no number', () => {
    expect(parseList('0.02, 0.01 0.03;0.02 x')).toEqual({ values: [0.03, 0.02, 0.01], refused: ['x'] });
  });
});

describe('the uncoded line', () => {
  it('is p for bits and 1 − (1 − p)^n for frames, with digits kept at small p', () => {
    expect(uncodedRate('ber', 0.01, 273)).toBe(0.01);
    expect(uncodedRate('fer', 0.01, 273)).toBeCloseTo(1 - 0.99 ** 273, 12);
    expect(uncodedRate('fer', 1e-17, 100) / 1e-15).toBeCloseTo(1, 10);
  });
});

import { describe, expect, test } from 'vitest';
import type { Measurement } from '@/api/measurements.ts';
import { curveLabels } from '@/client/curves/curve-labels.ts';
import { pointsOf, proposedRoles, readSheet } from '@/client/curves/measured-csv.ts';
import { measuredCurves } from '@/client/curves/measured-curves.ts';

const size = { n: 100, k: 50 };
const read = (text: string, at = size) => {
  const sheet = readSheet(text);
  return pointsOf(sheet, proposedRoles(sheet.heads), at);
};

describe('a file of measured rates', () => {
  test('tells its columns by their names, whatever parts them', () => {
    expect(proposedRoles(['p', 'Frames', 'frame errors', 'BER', 'remark'])).toEqual([
      'p',
      'frames',
      'frameErrors',
      'ber',
      'none',
    ]);
    expect(readSheet('p;frames;FER\n0.01;100;0.5\n').heads).toEqual(['p', 'frames', 'FER']);
    expect(readSheet('\uFEFFp\tframes\tFER\r\n0.01\t100\t0.5\r\n').rows).toEqual([['0.01', '100', '0.5']]);
  });

  test('of counts is taken as it is', () => {
    expect(read('p,frames,frame errors,bit errors\n0.01,1000,17,60\n1e-3,1e6,0,0\n')).toEqual({
      points: [
        { p: 0.01, frames: 1000, frameErrors: 17, bitErrors: 60 },
        { p: 0.001, frames: 1_000_000, frameErrors: 0, bitErrors: 0 },
      ],
    });
  });

  test('of rates with frames is turned into counts, and refused where a rate can be no count', () => {
    expect(read('p,frames,FER\n0.01,2000,0.0085\n')).toMatchObject({ points: [{ frameErrors: 17, bitErrors: null }] });
    expect(read('p,frames,FER\n0.01,10,0.1234\n')).toMatchObject({
      problem: expect.stringContaining('Line 2: frame error rate'),
    });
  });

  test('at a signal-to-noise ratio is set at the crossover of hard decisions: Q(√(2·R·Eb/N0))', () => {
    const reading = read('Eb/N0 (dB),frames,errors\n3.0103,1000,5\n', { n: 2, k: 1 });
    // R = 1/2 and Eb/N0 = 2: Q(√2) = 0.0786496, from a table of the Gaussian integral.
    expect(reading).toMatchObject({ points: [{ p: expect.closeTo(0.0786496, 6), ebn0Db: 3.0103 }] });
  });

  test.each([
    ['p,FER\n0.01,0.5\n', /count the frames/],
    ['frames,FER\n10,0.5\n', /p, or Eb\/N0/],
    ['p,Eb/N0,frames,FER\n0.01,3,10,0.5\n', /not both/],
    ['p,frames\n0.01,10\n', /frame errors, or the frame error rate/],
    ['p,frames,errors\n0.7,10,1\n', /Line 2: crossover.*0\.7.*at most 0\.5/],
    ['p,frames,errors\n0.1,10,11\n', /up to the frames/],
    ['p,frames,errors,bit errors\n0.1,10,2,201\n', /n = 100/],
    ['p,frames,errors\n0.1,x,1\n', /frames: got “x”/],
  ])('%j says what is wrong', (text, message) => {
    expect((read(text) as { problem: string }).problem).toMatch(message);
  });

  test('without figures is refused', () => {
    expect(() => readSheet('p,frames\n')).toThrow(/at least one line/);
    expect(() => readSheet('')).toThrow();
  });
});

test('measured data are a curve with intervals of their own; bits of a failed frame are from one to all', () => {
  const measured: Measurement = {
    id: 'm1',
    projectId: 'p',
    name: 'Bench B',
    fileName: 'b.csv',
    n: 100,
    k: 50,
    level: 0.95,
    points: [
      { p: 0.01, frames: 10, frameErrors: 1, bitErrors: 5, interval: { lower: 0.0025, upper: 0.445 } },
      { p: 0.02, frames: 100, frameErrors: 0, bitErrors: null, interval: { lower: 0, upper: 0.0296 } },
    ],
    createdAt: '',
    createdBy: '',
  };
  const curves = measuredCurves([measured]);
  const [zero, one] = curves[0]!.points;
  expect([zero!.p, zero!.fer]).toEqual([0.02, { value: null, lower: 0, upper: 0.0296 }]);
  expect(one!.fer).toEqual({ value: 0.1, lower: 0.0025, upper: 0.445 });
  expect(one!.ber).toEqual({ value: 0.005, lower: 0.000025, upper: 0.445 });
  expect(curveLabels(curves)).toEqual(['(100,50) measured']);
});

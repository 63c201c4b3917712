import { describe, expect, it } from 'vitest';
import { hardCrossover, noiseDeviation } from '../../../src/core/channels/awgn.ts';
import { fromDecibel, gaussianTail, portableExp, portableLog } from '../../../src/core/channels/portable-functions.ts';
import { ParamError } from '../../../src/core/errors.ts';

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe('functions of the five rounded operations', () => {
  // erfc(x/√2)/2 with mpmath 1.2.1 at 30 digits.
  it.each([
    [0.1, 0.460172162722971],
    [0.5, 0.3085375387259869],
    [1, 0.15865525393145705],
    [2.9, 0.0018658133003840384],
    [3, 0.0013498980316300946],
    [3.1, 0.0009676032132183566],
    [5, 2.866515718791939e-7],
    [10, 7.619853024160525e-24],
    [20, 2.7536241186062337e-89],
    [37, 5.725571222524577e-300],
  ])('Q(%d) is right to 10^-12', (x, truth) => {
    expect(relative(gaussianTail(x), truth)).toBeLessThan(1e-12);
  });

  it('exp and log agree with the built-in ones to 4 units in the last place', () => {
    for (let x = -700; x <= 700; x += 0.37) {
      expect(relative(portableExp(x), Math.exp(x))).toBeLessThan(1e-15);
      const y = Math.exp(x);
      expect(Math.abs(portableLog(y) - Math.log(y))).toBeLessThan(1e-15 * Math.max(1, Math.abs(x)));
    }
    for (let x = 0.5; x < 2; x += 0.00037) {
      expect(Math.abs(portableLog(x) - Math.log(x))).toBeLessThan(2.3e-16);
    }
  });

  it('10 dB is a ratio of ten', () => {
    expect(relative(fromDecibel(10), 10)).toBeLessThan(1e-15);
    expect(relative(fromDecibel(3), 10 ** 0.3)).toBeLessThan(1e-15);
  });
});

describe('a level in Eb/N0', () => {
  it('at rate 1/2 and 0 dB is noise of variance 1', () => {
    expect(noiseDeviation(0, 0.5)).toBe(1);
  });

  it('with hard decisions is a binary symmetric channel with p = Q(1/σ)', () => {
    expect(relative(hardCrossover(0, 0.5), 0.15865525393145705)).toBeLessThan(1e-13);
  });

  it('needs a rate, and an error probability above nil', () => {
    expect(() => noiseDeviation(0, undefined)).toThrow(ParamError);
    expect(() => noiseDeviation(0, 0)).toThrow(ParamError);
    expect(() => hardCrossover(30, 1)).toThrow(ParamError);
  });
});

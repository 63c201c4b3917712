import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { intervalText, parameterText, rateText, scientific } from '@/components/charts/rate-text.ts';

describe('a rate in words', () => {
  it('carries a real minus and a superscript', () => {
    expect(scientific(7.4e-4)).toBe('7.4\u202f×\u202f10⁻⁴');
    expect(scientific(1e-15, 1)).toBe('10⁻¹⁵');
  });

  it('of a hundredth and more is plain, its limits rounded outward all the same', () => {
    expect(rateText({ value: 0.98886, lower: 0.98, upper: 0.99 }, 3)).toBe('0.989');
    expect(rateText({ value: 1, lower: 0.99, upper: 1 })).toBe('1');
    expect(rateText({ value: 0.0123, lower: 0.01, upper: 0.02 })).toBe('0.012');
    expect(intervalText({ value: 0.9, lower: 0.8912, upper: 0.9112 })).toBe('0.89 – 0.92');
    expect(intervalText({ value: 1, lower: 0.9997, upper: 1 })).toBe('0.99 – 1');
    expect(intervalText({ value: 0.0101, lower: 0.0092, upper: 0.0112 })).toBe('9.2\u202f×\u202f10⁻³ – 0.012');
  });

  it('with no error seen reads as a bound and never as 0', () => {
    expect(rateText({ value: null, lower: 0, upper: 2.9957e-6 })).toBe('<\u202f3.0\u202f×\u202f10⁻⁶');
    expect(intervalText({ value: null, lower: 0, upper: 2.9957e-6 })).toBe('<\u202f3.0\u202f×\u202f10⁻⁶');
  });

  it('has limits that are rounded away from the claim', () => {
    expect(intervalText({ value: 7e-4, lower: 6.19e-4, upper: 8.01e-4 })).toBe('(6.1 – 8.1)\u202f×\u202f10⁻⁴');
    expect(intervalText({ value: 1e-3, lower: 9.99e-4, upper: 1.001e-3 })).toBe(
      '9.9\u202f×\u202f10⁻⁴ – 1.1\u202f×\u202f10⁻³',
    );
    expect(scientific(9.91e-3, 2, 'up')).toBe('1.0\u202f×\u202f10⁻²');
    expect(scientific(1.0e-2 - 1e-6, 2, 'down')).toBe('9.9\u202f×\u202f10⁻³');
  });

  it('rounded up is never below the number, rounded down never above', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-18, max: 1, noNaN: true }), fc.integer({ min: 1, max: 5 }), (x, digits) => {
        const read = (text: string) => {
          const [mantissa, power] = text.split('\u202f×\u202f10');
          const exponent = [...(power ?? text.slice(2))]
            .map((c) => (c === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c)))
            .join('');
          return Number(`${power === undefined ? 1 : mantissa}e${exponent}`);
        };
        expect(read(scientific(x, digits, 'up'))).toBeGreaterThanOrEqual(x);
        expect(read(scientific(x, digits, 'down'))).toBeLessThanOrEqual(x);
      }),
    );
  });

  it('shows channel parameters as typed', () => {
    expect(parameterText(0.012)).toBe('0.012');
    expect(parameterText(0.5)).toBe('0.5');
    expect(parameterText(3e-5)).toBe('3\u202f×\u202f10⁻⁵');
    expect(parameterText(1.25e-5)).toBe('1.25\u202f×\u202f10⁻⁵');
  });
});

import { render } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { counted, duration, scientific, scientificParts, wholeNumber } from '@/components/ui/numbers.ts';
import { Sci } from '@/components/ui/Sci.tsx';

describe('how numbers are written', () => {
  test('whole numbers from five digits on are grouped by thin spaces', () => {
    expect(wholeNumber(4161)).toBe('4161');
    expect(wholeNumber(16513)).toBe('16\u202f513');
    expect(wholeNumber(-1048576)).toBe('−1\u202f048\u202f576');
    expect(wholeNumber(12345678901234567890n)).toBe('12\u202f345\u202f678\u202f901\u202f234\u202f567\u202f890');
  });

  test.each([
    [0.05, '0.05'],
    [0.012, '0.012'],
    [0.001, '0.001'],
    [1, '1'],
    [0, '0'],
    [0.763, '0.763'],
    [0.7634408, '0.763'],
    [-3.25, '−3.25'],
    [7.4e-4, '7.40\u202f×\u202f10⁻⁴'],
    [1e-15, '1.00\u202f×\u202f10⁻¹⁵'],
    [1.5e7, '1.50\u202f×\u202f10⁷'],
    [Number.POSITIVE_INFINITY, '∞'],
    [Number.NaN, 'no value'],
  ])('%d is written %s', (value, text) => {
    expect(scientific(value)).toBe(text);
  });

  test('the number of significant digits is kept', () => {
    expect(scientificParts(7.4e-4, 2)).toEqual({ mantissa: '7.4', exponent: -4 });
    expect(scientificParts(0.0123456, 2)).toEqual({ mantissa: '0.012', exponent: null });
  });

  test('Sci raises the exponent with a real minus sign', () => {
    const { container } = render(<Sci value={2.4e-3 / 10} digits={2} prefix="≤" />);
    expect(container.textContent).toBe('≤\u202f2.4\u202f×\u202f10−4');
    expect(container.querySelector('sup')?.textContent).toBe('−4');
  });

  test.each([
    [412, '412 ms'],
    [4120, '4.1 s'],
    [100_000, '1 min 40 s'],
    [120_000, '2 min'],
    [11_520_000, '3 h 12 min'],
    [3_600_000 + 9000, '1 h'],
    [180_000_000, '2 d 2 h'],
    [Number.POSITIVE_INFINITY, 'unknown'],
  ])('%d ms is said as %s', (elapsedMs, text) => {
    expect(duration(elapsedMs)).toBe(text);
  });

  test('one is singular', () => {
    expect(counted(1, 'code')).toBe('1 code');
    expect(counted(4, 'code')).toBe('4 codes');
  });
});

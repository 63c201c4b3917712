/** Reads a number as people write it: 1e-15, 10^-15, 1.5 × 10⁻⁹, 16 513, 0,05 is refused, a real minus sign is fine.
 *  Empty text is undefined; text that is no number is NaN, for a schema to refuse. */
export function typedNumber(text: string): number | undefined {
  const plain = text
    .replace(/10(?=[⁻⁺⁰¹²³⁴-⁹])/g, '10^')
    .normalize('NFKC')
    .replace(/[\s\u2009\u202f_]/g, '')
    .replace(/\u2212|\u2013/g, '-')
    .replace(/[×*·]10\^?/, 'e')
    .replace(/^([+-]?)10\^/, '$11e');
  if (plain === '') return undefined;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN;
}

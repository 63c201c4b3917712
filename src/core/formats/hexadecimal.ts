import type { Gf2Polynomial } from '../algebra/gf2-polynomial.ts';

const digits = new TextEncoder().encode('0123456789abcdef');
const ascii = new TextDecoder();

/** The order of bits in every word written in hexadecimal, as files state it. */
export const wordBitOrder =
  'bit 0 first: it is the most significant bit of the first hexadecimal digit; the last digit is filled up with zeros';

/** A word, one byte 0 or 1 a bit, four bits to a digit: bit 0 is the most significant bit of the first digit. */
export function wordToHex(word: Uint8Array): string {
  const codes = new Uint8Array((word.length + 3) >>> 2);
  for (let d = 0, i = 0; d < codes.length; d++, i += 4) {
    // Past the end an element is undefined, which the operators read as 0.
    codes[d] = digits[((word[i]! << 3) | (word[i + 1]! << 2) | (word[i + 2]! << 1) | word[i + 3]!) & 15]!;
  }
  return ascii.decode(codes);
}

/** The word of so many bits; null when the text has another length, other signs, or ones after the last bit. */
export function wordFromHex(text: string, bits: number): Uint8Array | null {
  if (text.length !== Math.ceil(bits / 4) || !/^[0-9a-f]*$/i.test(text)) return null;
  const word = new Uint8Array(bits);
  for (let i = 0; i < 4 * text.length; i++) {
    const bit = (Number.parseInt(text[i >> 2]!, 16) >> (3 - (i & 3))) & 1;
    if (i < bits) word[i] = bit;
    else if (bit) return null;
  }
  return word;
}

/** A polynomial as a number whose bit i is the coefficient of x^i, at so many hexadecimal digits at least. */
export function polynomialToHex(f: Gf2Polynomial, width = 1): string {
  const text = Array.from(f, (word) => word.toString(16).padStart(8, '0'))
    .reverse()
    .join('');
  return text.replace(/^0+/, '').padStart(width, '0');
}

/** The polynomial of such a number; null when the text is none. */
export function polynomialFromHex(text: string): Gf2Polynomial | null {
  if (!/^[0-9a-f]+$/i.test(text)) return null;
  const words = Math.ceil(text.length / 8);
  const padded = text.padStart(8 * words, '0');
  return Uint32Array.from({ length: words }, (_, i) =>
    Number.parseInt(padded.slice(8 * (words - 1 - i), 8 * (words - i)), 16),
  );
}

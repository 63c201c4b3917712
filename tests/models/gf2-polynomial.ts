/** The plain twin of the word-packed polynomials: one bigint, bit i the coefficient of x^i. */
export function bigintOf(words: Uint32Array): bigint {
  return words.reduceRight((sum, word) => (sum << 32n) | BigInt(word), 0n);
}

function degree(a: bigint): number {
  return a === 0n ? -1 : a.toString(2).length - 1;
}

export function plainProduct(a: bigint, b: bigint): bigint {
  let product = 0n;
  for (let i = 0; i <= degree(a); i++) if ((a >> BigInt(i)) & 1n) product ^= b << BigInt(i);
  return product;
}

export function plainRemainder(a: bigint, divisor: bigint): bigint {
  let rest = a;
  while (degree(rest) >= degree(divisor)) rest ^= divisor << BigInt(degree(rest) - degree(divisor));
  return rest;
}

export function plainGcd(a: bigint, b: bigint): bigint {
  return b === 0n ? a : plainGcd(b, plainRemainder(a, b));
}

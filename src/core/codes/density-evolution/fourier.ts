/** In-place complex Fourier transform of a power-of-two length (Cooley and Tukey 1965), forward, or inverse unscaled. */
export function fourierTransform(re: Float64Array, im: Float64Array, inverse = false): void {
  const n = re.length;
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) {
      [re[i], re[j]] = [re[j]!, re[i]!];
      [im[i], im[j]] = [im[j]!, im[i]!];
    }
  }
  for (let size = 2; size <= n; size <<= 1) butterflies(re, im, size, inverse ? 1 : -1);
}

function butterflies(re: Float64Array, im: Float64Array, size: number, sign: 1 | -1): void {
  const half = size >> 1;
  const [cosines, sines] = turnsOf(size);
  for (let k = 0; k < half; k++) {
    const c = cosines[k]!;
    const s = sign * sines[k]!;
    for (let i = k; i < re.length; i += size) {
      const j = i + half;
      const x = re[j]! * c - im[j]! * s;
      const y = re[j]! * s + im[j]! * c;
      re[j] = re[i]! - x;
      im[j] = im[i]! - y;
      re[i]! += x;
      im[i]! += y;
    }
  }
}

const turns = new Map<number, readonly [Float64Array, Float64Array]>();

/** Cosines and sines of the multiples of a turn divided by `size`. */
function turnsOf(size: number): readonly [Float64Array, Float64Array] {
  const known = turns.get(size);
  if (known) return known;
  const angles = Float64Array.from({ length: size >> 1 }, (_, k) => (2 * Math.PI * k) / size);
  const made = [angles.map(Math.cos), angles.map(Math.sin)] as const;
  turns.set(size, made);
  return made;
}

import { ParamError } from '../errors.ts';

/** Capacity of the real Gaussian channel at a signal-to-noise ratio Es/σ², ½·log2(1 + snr) bits a use (Shannon 1949); no
 *  binary input reaches it at high ratios. */
export function awgnCapacity(snr: number): number {
  if (!(snr >= 0)) throw new ParamError('snr', snr, 'a ratio of 0 or more');
  return 0.5 * Math.log1p(snr) * Math.LOG2E;
}

export interface ChannelMoments {
  /** Bits a use. */
  capacity: number;
  /** Bits². */
  dispersion: number;
}

/** Capacity and dispersion for inputs ±1 in Gaussian noise of deviation sigma: mean and variance of
 *  1 − log2(1 + e^(−L)), L the log-likelihood ratio 2(1 + σZ)/σ². Integrated by the trapezium rule, whose error falls
 *  faster than any power of the step for such integrands: about 1e-14 here.
 *  @throws ParamError unless sigma > 0. */
export function binaryInputAwgn(sigma: number): ChannelMoments {
  if (!(sigma > 0)) throw new ParamError('sigma', sigma, 'a standard deviation above 0');
  let mass = 0;
  let lost = 0;
  let lostSquared = 0;
  // Steps short against both the noise and the turn of the integrand, which is σ²/2 wide, that is σ/2 in z.
  const step = Math.min(0.02, sigma / 40);
  for (let z = -13; z <= 13; z += step) {
    const weight = Math.exp((-z * z) / 2);
    const ratio = (2 * (1 + sigma * z)) / sigma ** 2;
    const loss = (ratio > 0 ? Math.log1p(Math.exp(-ratio)) : -ratio + Math.log1p(Math.exp(ratio))) * Math.LOG2E;
    mass += weight;
    lost += weight * loss;
    lostSquared += weight * loss * loss;
  }
  const mean = lost / mass;
  return { capacity: 1 - mean, dispersion: lostSquared / mass - mean ** 2 };
}

/** Noise deviation of BPSK with unit symbols at Eb/N0 in decibels and a rate. */
export const noiseDeviation = (ebn0Db: number, rate: number): number => Math.sqrt(1 / (2 * rate * 10 ** (ebn0Db / 10)));

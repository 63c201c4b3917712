import { ParamError } from '../../errors.ts';
import type { Transform } from '../ldpc.ts';

/** What a sector offers: bits to carry, and bits for parity. */
export interface SectorFit {
  payloadBits: number;
  parityBits: number;
}

export interface ExactFit {
  /** Steps that bring the base code to exactly the payload. */
  transforms: Transform[];
  shortenedBits: number;
  /** Parity bits of the budget that this code leaves unused; 0 is a fit to the bit. */
  spareParityBits: number;
}

/** Shortening, and an overall parity bit where one parity bit would be left over, that give a code of dimension exactly
 *  `payloadBits` with at most `parityBits` of parity; null when the base code is too short or has too much parity. Where
 *  all words of the base are even, as those of a plane of even order are, the overall parity bit is always 0: it fills
 *  the sector and corrects nothing more.
 *  @throws ParamError unless both are whole and positive. */
export function exactFit(base: { n: number; k: number }, { payloadBits, parityBits }: SectorFit): ExactFit | null {
  for (const [name, value] of Object.entries({ payloadBits, parityBits })) {
    if (!Number.isSafeInteger(value) || value < 1) throw new ParamError(name, value, 'a whole number of 1 or more');
  }
  const shortenedBits = base.k - payloadBits;
  const spare = parityBits - (base.n - base.k);
  if (shortenedBits < 0 || spare < 0) return null;
  const transforms: Transform[] = shortenedBits > 0 ? [{ kind: 'shorten', bits: shortenedBits }] : [];
  if (spare === 1) transforms.push({ kind: 'extend-by-parity' });
  return { transforms, shortenedBits, spareParityBits: spare === 1 ? 0 : spare };
}

/** The base codes that fit, tightest parity first, then least shortening. */
export function rankFits<B extends { n: number; k: number }>(
  bases: readonly B[],
  sector: SectorFit,
): (ExactFit & { base: B })[] {
  return bases
    .flatMap((base) => {
      const fit = exactFit(base, sector);
      return fit ? [{ ...fit, base }] : [];
    })
    .sort((a, b) => a.spareParityBits - b.spareParityBits || a.shortenedBits - b.shortenedBits);
}

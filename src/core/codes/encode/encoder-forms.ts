import type { TriangularEncoder } from './approximate-triangular.ts';
import type { ShiftRegister } from './shift-register.ts';
import type { SystematicCirculants } from './systematic-circulants.ts';
import type { SystematicEncoder } from './systematic-encoder.ts';

/** One way to build an encoder, and what it takes. A sum of m bits is m − 1 XOR gates of two inputs. Control, and the
 *  registers that hold the word on its way in and out, are left out. */
export interface EncoderForm {
  form: string;
  xor2: number;
  /** AND gates of two inputs, where stored bits are let through by the information bit. */
  and2: number;
  flipFlops: number;
  romBits: number;
  /** Clock cycles for a word. */
  cycles: number;
  /** How the counts come about. */
  method: string;
}

/** A generator [I | P] by its dense P. */
export function denseForms(encoder: SystematicEncoder, n: number): EncoderForm[] {
  const { k } = encoder;
  const parity = n - k;
  const terms = new Uint32Array(parity);
  for (const row of encoder.parityRows()) for (let j = 0; j < parity; j++) terms[j]! += row[j]!;
  return [
    {
      form: 'all parity bits at once',
      xor2: gatesOf(terms),
      and2: 0,
      flipFlops: 0,
      romBits: 0,
      cycles: 1,
      method: 'ones of each column of P, less one',
    },
    {
      form: 'one information bit a clock',
      xor2: parity,
      and2: parity,
      flipFlops: parity,
      romBits: k * parity,
      cycles: k,
      method: 'P stored by rows; an accumulator for each of n − k parity bits',
    },
  ];
}

/** The registers of g and of h. */
export function registerForms({ n, k, generator, parity }: ShiftRegister): EncoderForm[] {
  return [
    {
      form: 'register of the generator polynomial',
      xor2: Math.max(0, generator.length - 1),
      and2: 0,
      flipFlops: n - k,
      romBits: 0,
      cycles: n,
      method: 'one gate at the input and one at each tap; n − k stages',
    },
    {
      form: 'register of the parity polynomial',
      xor2: Math.max(0, parity.length - 2),
      and2: 0,
      flipFlops: k,
      romBits: 0,
      cycles: n,
      method: 'a sum over the terms of h below its leading one; k stages',
    },
  ];
}

/** Circulants: shift-register-adder-accumulators (Li et al. 2006, §V), or all at once. */
export function circulantForms({ z, k, parityBlocks, firstRows }: SystematicCirculants): EncoderForm[] {
  const parity = parityBlocks.length * z;
  const terms = parityBlocks.flatMap((_, j) => {
    const ones = firstRows.reduce((sum, row) => sum + row[j]!.length, 0);
    return Array<number>(z).fill(ones);
  });
  return [
    {
      form: 'shift-register-adder-accumulators',
      xor2: parity,
      and2: parity,
      flipFlops: 2 * parity,
      romBits: firstRows.length * parity,
      cycles: k,
      method: 'each parity block turns a first row of z bits past its accumulator; first rows stored',
    },
    {
      form: 'all parity bits at once',
      xor2: gatesOf(terms),
      and2: 0,
      flipFlops: 0,
      romBits: 0,
      cycles: 1,
      method: 'ones of the first rows above each parity block, z times, less one',
    },
  ];
}

/** The approximate lower-triangular form. */
export function triangularForms({ gap, sums }: TriangularEncoder, n: number): EncoderForm[] {
  const terms = sums.reduce((sum, count) => sum + count, 0);
  const address = Math.ceil(Math.log2(Math.max(2, n)));
  return [
    {
      form: 'all sums wired',
      xor2: gatesOf(sums),
      and2: 0,
      flipFlops: 0,
      romBits: 0,
      cycles: 1,
      method: 'terms of every sum, less one; the triangle is walked twice where the gap is not 0',
    },
    {
      form: 'one term a clock',
      xor2: 1,
      and2: 0,
      flipFlops: 1,
      romBits: terms * address,
      cycles: terms,
      method: `the position of each term stored in ${address} bits; the gap’s sums among them, ${gap} by ${gap} at most`,
    },
  ];
}

/** Gates of sums with so many terms each. */
function gatesOf(terms: ArrayLike<number>): number {
  let gates = 0;
  for (let i = 0; i < terms.length; i++) gates += Math.max(0, terms[i]! - 1);
  return gates;
}

import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { cyclicGenerators } from '../gf2/cyclic.ts';
import { writeGeneratorCirculants } from './generator-circulants.ts';
import { writeGeneratorPolynomial } from './generator-polynomial.ts';
import { writeGeneratorSystematic } from './generator-systematic.ts';
import { circulantBlockSize } from './quasi-cyclic.ts';

/** One way to describe a code's generator in a file; each is read back by the file that writes it. */
export interface GeneratorForm {
  id: 'polynomial' | 'circulants' | 'systematic';
  title: string;
  extension: string;
  /** Whether this code has such a description. */
  writes(H: SparseMatrix): boolean;
  write(H: SparseMatrix): Uint8Array;
}

export const generatorForms: readonly GeneratorForm[] = [
  {
    id: 'polynomial',
    title: 'generator polynomial',
    extension: 'polynomial.txt',
    writes: (H) => cyclicGenerators(H) !== null,
    write: writeGeneratorPolynomial,
  },
  {
    id: 'circulants',
    title: 'generator by circulants',
    extension: 'circulants.txt',
    writes: (H) => circulantBlockSize(H) !== null,
    write: writeGeneratorCirculants,
  },
  {
    id: 'systematic',
    title: 'systematic generator matrix',
    extension: 'systematic.txt',
    writes: () => true,
    write: writeGeneratorSystematic,
  },
];

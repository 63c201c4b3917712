import type { Family } from '../family.ts';
import { steinerTriple } from './steiner-triple.ts';

/** Every family the program builds, in the order shown. A family is added by one file here and one line below. */
export const families: readonly Family[] = [
  steinerTriple, //
];

import { z } from 'zod';

const probability = (top: number, words: string) => z.number(words).gt(0, words).max(top, words);

/** Every channel a run may name; parameters as DEVELOPERS.md defines them. */
export const channelSchema = z.discriminatedUnion('kind', [
  /** Flips each bit with probability p, independently. */
  z.strictObject({ kind: z.literal('bsc'), p: probability(0.5, 'a crossover probability above 0 and at most 0.5') }),
  /** Erases each bit with probability e. */
  z.strictObject({ kind: z.literal('bec'), e: probability(1, 'an erasure probability above 0 and at most 1') }),
  /** BPSK with noise variance 1/(2·R·Eb/N0). */
  z.strictObject({ kind: z.literal('awgn'), ebn0Db: z.number().min(-10).max(30) }),
  /** Its sign: a binary symmetric channel with p = Q(√(2·R·Eb/N0)). */
  z.strictObject({ kind: z.literal('awgn-hard'), ebn0Db: z.number().min(-10).max(30) }),
  /** Flips only ones. */
  z.strictObject({ kind: z.literal('z'), p: probability(1, 'a probability above 0 and at most 1') }),
  /** Two states, each a binary symmetric channel; starts in its stationary state each frame. */
  z.strictObject({
    kind: z.literal('gilbert-elliott'),
    pGood: z.number().min(0).max(0.5),
    pBad: z.number().min(0).max(0.5),
    goodToBad: probability(1, 'a probability above 0 and at most 1'),
    badToGood: probability(1, 'a probability above 0 and at most 1'),
  }),
  /** A uniformly random pattern of that many errors. */
  z.strictObject({ kind: z.literal('stratum'), weight: z.int().min(0) }),
]);
export type Channel = z.infer<typeof channelSchema>;

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Channel } from '../../src/core/channels/channel.ts';
import { systematicEncoder } from '../../src/core/codes/encode/systematic-encoder.ts';
import { matrixFromRows, type SparseMatrix, syndrome } from '../../src/core/codes/sparse-matrix.ts';
import { decoderCard, decoderCards, edgeVisitsPerBit } from '../../src/core/decoders/catalogue.ts';
import { createDecoder, decodesErasures } from '../../src/core/decoders/create-decoder.ts';
import { erased } from '../../src/core/decoders/decoder.ts';
import { type DecoderSpec, decoderSchema } from '../../src/core/decoders/decoder-spec.ts';
import { iterationCap } from '../../src/core/decoders/settings.ts';
import { ParamError } from '../../src/core/errors.ts';
import { guaranteedRadius } from '../../src/core/simulation/guaranteed-radius.ts';
import { runShard } from '../../src/core/simulation/shard.ts';
import { impossibleTally } from '../../src/core/simulation/tally.ts';
import { smallMatrix } from '../models/random-matrix.ts';
import { developed, planarDifferenceSets } from '../reference/difference-sets.ts';

const plane2 = developed(7, planarDifferenceSets[2].set);
const plane4 = developed(21, planarDifferenceSets[4].set);

/** One spec or more of every kind, and a matrix it accepts. */
const cases: { name: string; spec: DecoderSpec; H: SparseMatrix }[] = (
  [
    { kind: 'majority-logic' },
    { kind: 'gallager-a' },
    { kind: 'gallager-b' },
    { kind: 'gallager-b', threshold: [4, 4, 3] },
    { kind: 'bit-flipping' },
    { kind: 'bit-flipping', threshold: 4 },
    { kind: 'bit-flipping-max' },
    { kind: 'gradient-descent' },
    { kind: 'gradient-descent', flips: 'single' },
    { kind: 'peeling' },
    { kind: 'elimination' },
    { kind: 'sum-product' },
    { kind: 'min-sum' },
    { kind: 'min-sum', schedule: 'flooding', scale: 'offset-1', c: 8 },
    { kind: 'two-stage', stages: [{ kind: 'bit-flipping' }, { kind: 'bit-flipping-max' }, { kind: 'sum-product' }] },
  ] as DecoderSpec[]
)
  .map((spec) => ({ name: JSON.stringify(spec), spec, H: plane4 }))
  .concat({ name: 'finite-alphabet', spec: { kind: 'finite-alphabet' }, H: plane2 });

const channelOf = (spec: DecoderSpec): Channel =>
  decodesErasures(spec) ? { kind: 'bec', e: 0.3 } : { kind: 'bsc', p: 0.06 };

describe.each(cases)('decoder $name', ({ spec, H }) => {
  const channel = channelOf(spec);
  const mark = (sent: Uint8Array, positions: readonly number[]) => {
    const received = sent.slice();
    for (const j of positions) received[j] = decodesErasures(spec) ? erased : 1 - sent[j]!;
    return received;
  };
  const pattern = fc.uniqueArray(fc.nat(H.cols - 1), { maxLength: H.cols });
  const encoder = systematicEncoder({ H });
  const codeword = fc
    .array(fc.nat(1), { minLength: encoder.k, maxLength: encoder.k })
    .map((info) => encoder.encode(Uint8Array.from(info)));

  it('takes no iteration and changes nothing when nothing went wrong', () => {
    const decoder = createDecoder(H, spec, channel);
    fc.assert(
      fc.property(codeword, (sent) => {
        const decoded = decoder.decode(sent);
        expect(Array.from(decoded.word)).toEqual(Array.from(sent));
        expect(decoded).toMatchObject({ iterations: 0, converged: true });
      }),
      { numRuns: 30 },
    );
  });

  it('makes the same errors on a codeword as on the zero word', () => {
    const decoder = createDecoder(H, spec, channel);
    fc.assert(
      fc.property(codeword, pattern, (sent, positions) => {
        const zero = { ...decoder.decode(mark(new Uint8Array(H.cols), positions)) };
        const errors = zero.word.slice();
        const decoded = decoder.decode(mark(sent, positions));
        const difference = decoded.word.map((bit, j) => (bit === erased ? erased : bit ^ sent[j]!));
        expect(Array.from(difference)).toEqual(Array.from(errors));
        expect([decoded.iterations, decoded.converged]).toEqual([zero.iterations, zero.converged]);
      }),
      { numRuns: 60 },
    );
  });

  it('says it converged exactly when every check holds, within its cap', () => {
    const decoder = createDecoder(H, spec, channel);
    fc.assert(
      fc.property(pattern, (positions) => {
        const { word, iterations, converged } = decoder.decode(mark(new Uint8Array(H.cols), positions));
        const holds = !word.includes(erased) && !syndrome(H, word).includes(1);
        expect(converged).toBe(holds);
        expect(iterations).toBeLessThanOrEqual(iterationCap(spec));
      }),
      { numRuns: 60 },
    );
  });

  it('gives the same word step by step, and for a frame whatever came before it', () => {
    const decoder = createDecoder(H, spec, channel);
    fc.assert(
      fc.property(pattern, pattern, (before, positions) => {
        const received = mark(new Uint8Array(H.cols), positions);
        decoder.decode(mark(new Uint8Array(H.cols), before));
        const once = { ...decoder.decode(received), word: decoder.decode(received).word.slice() };
        decoder.begin(received);
        let stepped = decoder.step();
        while (!stepped) stepped = decoder.step();
        expect(stepped).toEqual(once);
        expect(createDecoder(H, spec, channel).decode(received)).toEqual(once);
      }),
      { numRuns: 30 },
    );
  });

  it('corrects what its radius guarantees', () => {
    const radius = guaranteedRadius(H, spec);
    if (!radius) return;
    const decoder = createDecoder(H, spec, channel);
    const within = fc.uniqueArray(fc.nat(H.cols - 1), { maxLength: radius.value });
    fc.assert(
      fc.property(codeword, within, (sent, positions) => {
        expect(Array.from(decoder.decode(mark(sent, positions)).word)).toEqual(Array.from(sent));
      }),
    );
  });

  it('tallies what frames can come to', async () => {
    const run = { H, channel, decoder: spec, seed: 'contract', framesPerShard: 300 };
    const tally = await runShard(run, 0, 'reference');
    expect(impossibleTally(tally, H.cols, 300)).toBeNull();
    if (decodesErasures(spec)) expect(tally.undetected).toBe(0);
  });

  it('is described by a card, with its cost', () => {
    expect(decoderSchema.parse(spec)).toEqual(spec);
    expect(decoderCard(spec.kind).choose).toMatch(/\w\.$/);
    expect(edgeVisitsPerBit(H, spec, 2)).toBeGreaterThan(edgeVisitsPerBit(H, spec, 1));
  });

  it('refuses a matrix with an empty column', () => {
    expect(() => createDecoder(matrixFromRows(3, [[0, 1]]), spec, channel)).toThrow(ParamError);
  });
});

describe('all decoders', () => {
  it('have one card each', () => {
    const kinds = decoderSchema.options.map((option) => option.shape.kind.value).sort();
    expect(decoderCards.map(({ kind }) => kind).sort()).toEqual(kinds);
  });

  it('end on irregular matrices of any kind', () => {
    fc.assert(
      fc.property(smallMatrix, fc.nat(1023), fc.constantFrom(...cases), (H, bits, { spec }) => {
        if (spec.kind === 'finite-alphabet' || 'threshold' in spec) return;
        const received = Uint8Array.from({ length: H.cols }, (_, j) => (bits >> j) & 1);
        const marked = decodesErasures(spec) ? received.map((bit) => (bit ? erased : 0)) : received;
        const { word } = createDecoder(H, spec, channelOf(spec)).decode(marked);
        expect(word.length).toBe(H.cols);
      }),
      { numRuns: 200 },
    );
  });
});

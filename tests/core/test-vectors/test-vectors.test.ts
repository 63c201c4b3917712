import { describe, expect, test } from 'vitest';
import type { Channel } from '@/core/channels/channel.ts';
import { systematicEncoder } from '@/core/codes/encode/systematic-encoder.ts';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { syndrome } from '@/core/codes/sparse-matrix.ts';
import { createDecoder } from '@/core/decoders/create-decoder.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { LimitError, ParamError } from '@/core/errors.ts';
import { wordFromHex } from '@/core/formats/hexadecimal.ts';
import { runShard } from '@/core/simulation/shard.ts';
import { testVectors, type VectorRequest } from '@/core/test-vectors/test-vectors.ts';
import { type VectorForm, vectorFile } from '@/core/test-vectors/vector-files.ts';

const H = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 4 } }), { checks: 'blocks' }).H;
const head = { fingerprint: await fingerprint(H), title: 'plane of order 4' };

const hardDecoders: DecoderSpec[] = [{ kind: 'gallager-b' }, { kind: 'bit-flipping' }, { kind: 'min-sum' }];
const cases: [string, Channel, DecoderSpec[]][] = [
  ['bsc', { kind: 'bsc', p: 0.08 }, [...hardDecoders, { kind: 'sum-product' }]],
  ['z', { kind: 'z', p: 0.1 }, hardDecoders],
  [
    'gilbert-elliott',
    { kind: 'gilbert-elliott', pGood: 0.01, pBad: 0.3, goodToBad: 0.1, badToGood: 0.3 },
    hardDecoders,
  ],
  ['stratum', { kind: 'stratum', weight: 3 }, hardDecoders],
  ['bec', { kind: 'bec', e: 0.4 }, [{ kind: 'peeling' }, { kind: 'elimination' }]],
  ['awgn', { kind: 'awgn', ebn0Db: 2 }, [{ kind: 'sum-product' }, { kind: 'min-sum' }]],
];

async function text(request: VectorRequest, form: VectorForm): Promise<string> {
  let all = '';
  for await (const piece of vectorFile(H, request, form, head)) all += piece;
  return all;
}

describe.each(cases)('vectors on %s', (_name, channel, decoders) => {
  const request = { channel, decoders, seed: 'vectors', count: 40 };

  test('hold together: word, noise, syndrome, and what each decoder makes of it', async () => {
    const { infoPositions, encode, k } = systematicEncoder({ H });
    const again = decoders.map((spec) => createDecoder(H, spec, channel, k / H.cols));
    let frames = 0;
    for await (const vector of testVectors(H, request)) {
      expect(vector.frame).toBe(frames++);
      expect(encode(vector.info)).toEqual(vector.codeword);
      expect(Uint8Array.from(infoPositions, (c) => vector.codeword[c]!)).toEqual(vector.info);
      expect(syndrome(H, vector.codeword).some(Boolean)).toBe(false);
      expect(syndrome(H, vector.received)).toEqual(vector.syndrome);
      const erasing = channel.kind === 'bec';
      vector.received.forEach((bit, j) => {
        if (!erasing) expect(bit ^ vector.codeword[j]!).toBe(vector.error[j]);
        else expect(bit).toBe(vector.error[j] ? 0 : vector.codeword[j]);
      });
      const given = vector.outputs ?? vector.received.map((bit, j) => (erasing && vector.error[j] ? 2 : bit));
      vector.decoders.forEach((told, i) => {
        const { word, iterations, converged } = again[i]!.decode(given);
        expect([told.output, told.iterations, told.converged]).toEqual([word.slice(), iterations, converged]);
        expect(told.bitErrors).toBe(word.filter((bit, j) => bit !== vector.codeword[j]).length);
      });
    }
    expect(frames).toBe(40);
  });

  test('are the frames of shard 0 of a run with the same seed', async () => {
    const counts = decoders.map(() => ({ frameErrors: 0, iterations: 0 }));
    for await (const vector of testVectors(H, request)) {
      vector.decoders.forEach(({ bitErrors, iterations }, i) => {
        counts[i]!.frameErrors += bitErrors > 0 ? 1 : 0;
        counts[i]!.iterations += iterations;
      });
    }
    for (const [i, decoder] of decoders.entries()) {
      const spec = { H, channel, decoder, seed: 'vectors', framesPerShard: 40, sent: 'random' } as const;
      expect(await runShard(spec, 0, 'reference')).toMatchObject(counts[i]!);
    }
  });

  test('say the same as JSON Lines and as hexadecimal text, and the same every time', async () => {
    const lines = (await text(request, 'jsonl')).trimEnd().split('\n');
    const first = JSON.parse(lines[0]!);
    expect(first).toMatchObject({ n: 21, k: 11, rows: 21, fingerprint: head.fingerprint, count: 40, channel });
    expect(lines).toHaveLength(41);
    const hex = (await text(request, 'hex')).split(/^frame /m);
    expect(hex).toHaveLength(41);
    lines.slice(1).forEach((line, i) => {
      const vector = JSON.parse(line);
      const told = hex[i + 1]!;
      for (const name of ['info', 'codeword', 'error', 'received', 'syndrome']) {
        expect(new RegExp(`^${name} (\\w+)$`, 'm').exec(told)?.[1]).toBe(vector[name]);
        expect(wordFromHex(vector[name], name === 'info' ? 11 : 21)).not.toBeNull();
      }
      for (const [d, one] of vector.decoders.entries()) {
        const words = `decoder-${d} iterations ${one.iterations} converged ${+one.converged} bit-errors ${one.bitErrors} output ${one.output}`;
        expect(told).toContain(words);
      }
      if (channel.kind === 'awgn') {
        const digits = /^outputs (\w+)$/m.exec(told)![1]!;
        const bytes = Uint8Array.from(digits.match(/../g)!, (pair) => Number.parseInt(pair, 16));
        const view = new DataView(bytes.buffer);
        expect(vector.outputs.map((_: number, j: number) => view.getFloat64(8 * j))).toEqual(vector.outputs);
      }
    });
    expect(await text(request, 'jsonl')).toBe(`${lines.join('\n')}\n`);
  });
});

describe('vectors that cannot be', () => {
  const channel: Channel = { kind: 'bsc', p: 0.01 };
  const decoders: DecoderSpec[] = [{ kind: 'gallager-b' }];
  test.each([
    [{ channel, decoders, seed: 's', count: 0 }, ParamError, /count/],
    [{ channel, decoders, seed: 's', count: 1e6 }, LimitError, /100000 frames/],
    [{ channel, decoders: [], seed: 's', count: 1 }, ParamError, /decoders/],
    [{ channel, decoders: [{ kind: 'peeling' }] as DecoderSpec[], seed: 's', count: 1 }, ParamError, /channel.kind/],
    [{ channel: { kind: 'bsc', p: 2 } as Channel, decoders, seed: 's', count: 1 }, ParamError, /channel.p/],
  ])('%j say what would be accepted', async (request, kind, message) => {
    const first = text(request, 'jsonl');
    await expect(first).rejects.toThrow(kind);
    await expect(first).rejects.toThrow(message);
  });
});

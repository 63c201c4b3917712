import { systematicEncoder } from '../codes/encode/systematic-encoder.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { erased } from '../decoders/decoder.ts';
import { LimitError } from '../errors.ts';
import { wordBitOrder, wordToHex } from '../formats/hexadecimal.ts';
import { type DecoderVector, type TestVector, testVectors, type VectorRequest } from './test-vectors.ts';

export const vectorForms = [
  { id: 'jsonl', title: 'JSON Lines', extension: 'jsonl', mediaType: 'application/jsonl' },
  { id: 'hex', title: 'hexadecimal text', extension: 'hex.txt', mediaType: 'text/plain' },
] as const;
export type VectorForm = (typeof vectorForms)[number]['id'];

/** Most bytes that one file of vectors may take. */
const maxFileBytes = 2 ** 28;

/** What a file says of the code beside the vectors themselves. */
export interface VectorHead {
  fingerprint: string;
  title: string;
}

/** A file of test vectors, in pieces of text: a head that says everything they depend on, then frame by frame.
 *  @throws as testVectors; LimitError when the file would pass 256 MB. */
export async function* vectorFile(
  H: SparseMatrix,
  request: VectorRequest,
  form: VectorForm,
  head: VectorHead,
): AsyncGenerator<string> {
  const { infoPositions, k } = systematicEncoder({ H });
  const describe = form === 'jsonl' ? jsonHead : hexHead;
  const write = form === 'jsonl' ? jsonFrame : hexFrame;
  const facts = { ...head, ...request, n: H.cols, k, rows: H.rows, infoPositions: [...infoPositions] };
  let bytes = 0;
  let first = true;
  for await (const vector of testVectors(H, request)) {
    const text = first ? describe(facts) + write(vector) : write(vector);
    first = false;
    bytes += text.length;
    const expected = (bytes / (vector.frame + 1)) * request.count;
    if (expected > maxFileBytes) throw new LimitError('test vectors', Math.round(expected), maxFileBytes, 'bytes');
    yield text;
  }
}

type Facts = VectorHead & VectorRequest & { n: number; k: number; rows: number; infoPositions: number[] };

const meaning = {
  info: 'information bits, in the order of the information positions',
  codeword: 'the word sent',
  error: 'ones where the received word differs from the codeword; on the erasure channel, where a bit was erased',
  received: 'hard bits; an erased bit stands as 0; on the Gaussian channel 1 where the output is negative',
  syndrome: 'of the received word: bit i is the sum modulo 2 over row i of the matrix',
  output: 'the decoder’s word after so many iterations; an undecided erasure stands as 0 and is marked in `undecided`',
} as const;

function jsonHead({ title, fingerprint, n, k, rows, channel, decoders, seed, count, infoPositions }: Facts): string {
  const head = {
    vectors: 'blockwright-vectors-1',
    code: title,
    fingerprint,
    ...{ n, k, rows, seed, count, channel, decoders, infoPositions },
    bitOrder: wordBitOrder,
    meaning: {
      ...meaning,
      outputs: 'channel outputs for bits 0 to n−1 on the Gaussian channel; 0 is sent as +1 and 1 as −1',
    },
  };
  return `${JSON.stringify(head)}\n`;
}

function jsonFrame(vector: TestVector): string {
  const { frame, info, codeword, error, received, outputs, syndrome, decoders } = vector;
  const line = {
    frame,
    info: wordToHex(info),
    codeword: wordToHex(codeword),
    error: wordToHex(error),
    received: wordToHex(received),
    ...(outputs && { outputs: [...outputs] }),
    syndrome: wordToHex(syndrome),
    decoders: decoders.map((one) => ({
      output: outputHex(one),
      ...(one.output.includes(erased) && { undecided: undecidedHex(one) }),
      iterations: one.iterations,
      converged: one.converged,
      bitErrors: one.bitErrors,
    })),
  };
  return `${JSON.stringify(line)}\n`;
}

function hexHead({ title, fingerprint, n, k, rows, channel, decoders, seed, count, infoPositions }: Facts): string {
  const comments = [
    'test vectors, blockwright-vectors-1',
    `bit order: ${wordBitOrder}`,
    ...Object.entries(meaning).map(([name, words]) => `${name}: ${words.replaceAll('`', '')}`),
    'outputs: channel outputs for bits 0 to n-1 as IEEE 754 binary64, big-endian, 16 digits each',
  ];
  const facts: [string, string | number][] = [
    ['code', title],
    ['fingerprint', fingerprint],
    ['n', n],
    ['k', k],
    ['rows', rows],
    ['seed', JSON.stringify(seed)],
    ['count', count],
    ['channel', JSON.stringify(channel)],
    ...decoders.map((spec, i): [string, string] => [`decoder-${i}`, JSON.stringify(spec)]),
    ['information-positions', infoPositions.join(' ')],
  ];
  return `${comments.map((line) => `# ${line}\n`).join('')}${facts.map(([key, value]) => `${key}=${value}\n`).join('')}`;
}

function hexFrame(vector: TestVector): string {
  const { frame, info, codeword, error, received, outputs, syndrome, decoders } = vector;
  const lines = [
    `frame ${frame}`,
    `info ${wordToHex(info)}`,
    `codeword ${wordToHex(codeword)}`,
    `error ${wordToHex(error)}`,
    `received ${wordToHex(received)}`,
    ...(outputs ? [`outputs ${binary64Hex(outputs)}`] : []),
    `syndrome ${wordToHex(syndrome)}`,
    ...decoders.map((one, i) => {
      const undecided = one.output.includes(erased) ? ` undecided ${undecidedHex(one)}` : '';
      const counts = `iterations ${one.iterations} converged ${one.converged ? 1 : 0} bit-errors ${one.bitErrors}`;
      return `decoder-${i} ${counts} output ${outputHex(one)}${undecided}`;
    }),
  ];
  return `${lines.join('\n')}\n`;
}

const outputHex = ({ output }: DecoderVector) => wordToHex(output.map((bit) => (bit === 1 ? 1 : 0)));
const undecidedHex = ({ output }: DecoderVector) => wordToHex(output.map((bit) => (bit === erased ? 1 : 0)));

function binary64Hex(values: Float64Array): string {
  const view = new DataView(new ArrayBuffer(8));
  return Array.from(values, (value) => {
    view.setFloat64(0, value);
    return view.getBigUint64(0).toString(16).padStart(16, '0');
  }).join('');
}

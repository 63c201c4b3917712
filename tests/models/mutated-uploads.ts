import { type SeededRandom, seededRandom } from '@/core/algebra/seeded-random.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { FormatError, LimitError, ParamError } from '@/core/errors.ts';
import { writeBlockListText } from '@/core/formats/block-list.ts';
import { writeBlockListJson } from '@/core/formats/block-list-json.ts';
import { exportMatrix, matrixFormats } from '@/core/formats/index.ts';
import { readUpload } from '@/core/formats/read-upload.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';
import { quasiCyclicPlane } from './quasi-cyclic-plane.ts';

const design = buildDesign({ family: 'witt', params: { v: 11 } });

/** One small sound file a format. */
const sound: { format: UploadFormat; bytes: Uint8Array }[] = [
  ...matrixFormats.map(({ id }) => ({ format: id as UploadFormat, bytes: exportMatrix(quasiCyclicPlane, id) })),
  { format: 'blocks' as const, bytes: writeBlockListText(design) },
  { format: 'blocks-json' as const, bytes: writeBlockListJson(design) },
];

/** Pieces that readers are known to trip over. */
const telling = [
  '\0',
  '\r',
  '\n',
  ' ',
  ',',
  '-1',
  '0',
  '1',
  '4294967295',
  '4294967296',
  '1e9',
  '9999999999',
  '"',
  '{',
  '[',
  '#',
  '%',
  '\uFEFF',
  '\u00ff',
];

/** A file damaged in one to four places. */
export function mutate(bytes: Uint8Array, random: SeededRandom): Uint8Array {
  let out: Uint8Array = bytes.slice();
  for (let times = 1 + random.below(4); times > 0; times--) {
    const at = random.below(out.length + 1);
    const to = at + random.below(Math.min(40, out.length - at) + 1);
    const [before, part, after] = [out.subarray(0, at), out.subarray(at, to), out.subarray(to)];
    switch (random.below(6)) {
      case 0:
        if (at < out.length) out[at] = random.below(256);
        break;
      case 1:
        if (at < out.length) out[at]! ^= 1 << random.below(8);
        break;
      case 2:
        out = joined(before, after);
        break;
      case 3:
        out = joined(before, part, part, after);
        break;
      case 4:
        out = joined(before, new TextEncoder().encode(telling[random.below(telling.length)]!), after);
        break;
      default:
        out = before.slice();
    }
  }
  return out;
}

function joined(...parts: Uint8Array[]): Uint8Array {
  const out = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}

export interface Outcome {
  read: number;
  refused: number;
  slowestMs: number;
  /** The file that took longest, and any that ended in something else than a typed error. */
  slowest: string;
  crashes: string[];
}

/** Damages small sound files and reads them, by their own format or by whatever they look like. */
export function readMutated(seed: string, count: number): Outcome {
  const random = seededRandom(seed);
  const outcome: Outcome = { read: 0, refused: 0, slowestMs: 0, slowest: '', crashes: [] };
  for (let i = 0; i < count; i++) {
    const { format, bytes } = sound[random.below(sound.length)]!;
    const file = mutate(bytes, random);
    const stated = random.below(3) === 0 ? undefined : format;
    const [elapsedMs, error] = readOnce(file, stated);
    if (error === undefined) outcome.read++;
    else {
      outcome.refused++;
      if (![FormatError, LimitError, ParamError].some((kind) => error instanceof kind))
        outcome.crashes.push(`${stated ?? 'any'} ${i}: ${String(error)}`);
    }
    if (elapsedMs <= outcome.slowestMs) continue;
    // Other programs can only lengthen an answer, so the quickest of three is what the file takes of itself.
    const ownMs = Math.min(elapsedMs, readOnce(file, stated)[0], readOnce(file, stated)[0]);
    if (ownMs <= outcome.slowestMs) continue;
    outcome.slowestMs = ownMs;
    outcome.slowest = `${stated ?? 'any'} ${i}: ${Buffer.from(file).toString('latin1').slice(0, 300)}`;
  }
  return outcome;
}

function readOnce(file: Uint8Array, stated: UploadFormat | undefined): [elapsedMs: number, error?: unknown] {
  const from = performance.now();
  try {
    readUpload(file, stated);
    return [performance.now() - from];
  } catch (error) {
    return [performance.now() - from, error];
  }
}

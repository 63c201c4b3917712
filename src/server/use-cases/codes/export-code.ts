import type { z } from 'zod';
import type { blockFormSchema, generatorFormSchema, vectorQueryParams, wordFormSchema } from '@/api/releases.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { generatorForms } from '@/core/formats/generator-forms.ts';
import { wordForms } from '@/core/formats/word-forms.ts';
import { blockForms } from '@/core/release/release-files.ts';
import { vectorForms } from '@/core/test-vectors/vector-files.ts';
import type { Context } from '../../context.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { workerStream } from '../../jobs/worker-stream.ts';
import { Refusal } from '../../refusal.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { isWords, refuseWords } from './constant-weight.ts';
import { fileStem } from './file-stem.ts';
import { getCode } from './get-code.ts';

export interface StreamedFile {
  stream: ReadableStream<Uint8Array>;
  fileName: string;
  mediaType: string;
}

/** A request from outside, and where its file is made. */
export interface Export {
  context: Context;
  pool: FilesPool;
  codeId: string;
  /** Fires when the one who asked is gone. */
  signal: AbortSignal;
}

/** The blocks of a code's design, built anew. */
export async function exportBlocks(
  { context, pool, codeId, signal }: Export,
  formId: z.infer<typeof blockFormSchema>,
): Promise<StreamedFile> {
  const code = await getCode(context, codeId);
  if (code.design.family === 'uploaded')
    throw new Refusal('param', 'form: this code was uploaded as a matrix; it has no design to list.', {
      fields: { form: 'none: an uploaded matrix has no design' },
    });
  const form = blockForms.find(({ id }) => id === formId)!;
  const request = { kind: 'blocks', design: code.design as DesignSpec, form: formId } as const;
  const stream = await workerStream(pool, { ...request, provenance: { designTitle: code.designTitle } }, signal);
  return { stream, fileName: `${fileStem(code)}.blocks.${form.extension}`, mediaType: form.mediaType };
}

/** The code's generator in one of its forms. */
export async function exportGenerator(
  { context, pool, codeId, signal }: Export,
  formId: z.infer<typeof generatorFormSchema>,
): Promise<StreamedFile> {
  const code = await getCode(context, codeId);
  refuseWords(code, 'generator');
  const H = (await matrixOf(context.db, codeId))!;
  const { extension } = generatorForms.find(({ id }) => id === formId)!;
  const stream = await workerStream(pool, { kind: 'generator', H, form: formId }, signal);
  return { stream, fileName: `${fileStem(code)}.${extension}`, mediaType: 'text/plain' };
}

/** The words of a constant-weight code, in the order of their numbers. */
export async function exportWords(
  { context, pool, codeId, signal }: Export,
  formId: z.infer<typeof wordFormSchema>,
): Promise<StreamedFile> {
  const code = await getCode(context, codeId);
  if (!isWords(code)) {
    const accepted = 'a constant-weight code';
    throw new Refusal('param', `The words of this code are not listed; accepted is ${accepted}.`, {
      fields: { id: accepted },
    });
  }
  const words = (await matrixOf(context.db, codeId))!;
  const { extension, mediaType } = wordForms.find(({ id }) => id === formId)!;
  const stream = await workerStream(pool, { kind: 'words', words, form: formId }, signal);
  return { stream, fileName: `${fileStem(code)}.words.${extension}`, mediaType };
}

/** Test vectors of the code. */
export async function exportVectors(
  { context, pool, codeId, signal }: Export,
  { form: formId, ...request }: z.output<typeof vectorQueryParams>,
): Promise<StreamedFile> {
  const code = await getCode(context, codeId);
  refuseWords(code, 'test vectors');
  const H = (await matrixOf(context.db, codeId))!;
  const form = vectorForms.find(({ id }) => id === formId)!;
  const head = { fingerprint: code.fingerprint, title: `(${code.n},${code.k}) ${code.designTitle}` };
  const stream = await workerStream(pool, { kind: 'vectors', H, request, form: formId, head }, signal);
  return { stream, fileName: `${fileStem(code)}.vectors.${form.extension}`, mediaType: form.mediaType };
}

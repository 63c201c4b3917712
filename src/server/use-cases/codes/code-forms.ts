import type { CodeForms } from '@/api/releases.ts';
import { generatorForms } from '@/core/formats/generator-forms.ts';
import { matrixFormats } from '@/core/formats/index.ts';
import { wordForms } from '@/core/formats/word-forms.ts';
import { blockForms } from '@/core/release/release-files.ts';
import type { Context } from '../../context.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { isWords } from './constant-weight.ts';
import { getCode } from './get-code.ts';

/** Which files a code can be given as. */
export async function codeForms(context: Context, codeId: string): Promise<CodeForms> {
  const code = await getCode(context, codeId);
  const H = (await matrixOf(context.db, codeId))!;
  const named = <T extends { id: string; title: string }>({ id, title }: T) => ({ id: id as T['id'], title });
  return {
    formats: matrixFormats.filter((format) => format.writes?.(H) !== false).map(named) as CodeForms['formats'],
    generators: isWords(code) ? [] : generatorForms.filter((form) => form.writes(H)).map(named),
    blocks: code.design.family === 'uploaded' ? [] : blockForms.map(named),
    words: isWords(code) ? wordForms.map(named) : [],
  };
}

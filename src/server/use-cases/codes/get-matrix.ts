import type { MatrixFormat } from '@/api/codes.ts';
import { matrixFormat } from '@/core/formats/index.ts';
import { writeJson } from '@/core/formats/json.ts';
import type { Context } from '../../context.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { fileStem } from './file-stem.ts';
import { getCode } from './get-code.ts';
import { provenanceOf } from './provenance.ts';

export interface MatrixFile {
  bytes: Uint8Array;
  fileName: string;
  mediaType: string;
}

/** The parity-check matrix as a file in one of the formats. */
export async function getMatrix(context: Context, codeId: string, format: MatrixFormat): Promise<MatrixFile> {
  const code = await getCode(context, codeId);
  const codec = matrixFormat(format);
  const H = (await matrixOf(context.db, codeId))!;
  const bytes = format === 'json' ? writeJson(H, provenanceOf(code)) : codec.write(H);
  return { bytes, fileName: `${fileStem(code)}.${codec.extension}`, mediaType: codec.mediaType };
}

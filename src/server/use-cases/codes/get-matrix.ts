import type { MatrixFormat } from '@/api/codes.ts';
import { matrixFormat } from '@/core/formats/index.ts';
import type { Context } from '../../context.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { fileStem } from './file-stem.ts';
import { getCode } from './get-code.ts';

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
  return { bytes: codec.write(H), fileName: `${fileStem(code)}.${codec.extension}`, mediaType: codec.mediaType };
}

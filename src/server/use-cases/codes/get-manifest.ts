import { matrixFormats } from '@/core/formats/index.ts';
import type { Context } from '../../context.ts';
import { sha256Hex } from '../../files/matrix-blob.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { programVersion } from '../../version.ts';
import { isWords } from './constant-weight.ts';
import { fileStem } from './file-stem.ts';
import { getCode } from './get-code.ts';

/** Formats whose digests a manifest states by default: those that carry only the matrix and are quick to write. */
const digestedFormats = ['alist', 'mtx'];

const matrixDefinition =
  'SHA-256 over little-endian 32-bit words: rows, cols, then for each row its weight and its columns ascending.';
const wordsDefinition =
  'SHA-256 over little-endian 32-bit words: 0xffffffff, rows, cols, then for each row, which is a word of the code, its ' +
  'weight and its columns ascending.';

/** What a receiver needs to trust a matrix file: how the code came about, what is known of it, and digests. Holds no
 *  time of its own making, so that the same code gives the same manifest. */
export async function getManifest(context: Context, codeId: string) {
  const code = await getCode(context, codeId);
  const H = (await matrixOf(context.db, codeId))!;
  const files = matrixFormats
    .filter((codec) => digestedFormats.includes(codec.id))
    .map((codec) => {
      const bytes = codec.write(H);
      const fileName = `${fileStem(code)}.${codec.extension}`;
      return { format: codec.id, fileName, sizeBytes: bytes.length, sha256: sha256Hex(bytes) };
    });
  return {
    manifest: 'blockwright-code-1',
    program: { name: 'Blockwright', version: programVersion },
    code: { id: code.id, name: code.name, createdAt: code.createdAt, createdBy: code.createdBy },
    design: code.design,
    designTitle: code.designTitle,
    derivation: code.derivation,
    parameters: { n: code.n, k: code.k, rows: code.rows, ones: code.ones },
    rowWeights: code.rowWeights,
    columnWeights: code.columnWeights,
    certificate: code.certificate,
    properties: code.properties,
    fingerprint: code.fingerprint,
    fingerprintDefinition: isWords(code) ? wordsDefinition : matrixDefinition,
    files,
    caution:
      'Measured error rates hold for the channel model and decoder stated, not for a device. Extrapolation below the ' +
      'measured region is not evidence, and an error floor can lie beneath it. The qualification standard of the ' +
      'product and the engineer responsible decide.',
  };
}

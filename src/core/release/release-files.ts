import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { DesignSpec } from '../designs/block-design.ts';
import { buildDesign } from '../designs/design.ts';
import { ParamError } from '../errors.ts';
import { writeBlockListText } from '../formats/block-list.ts';
import { writeBlockListJson } from '../formats/block-list-json.ts';
import { type GeneratorForm, generatorForms } from '../formats/generator-forms.ts';
import { matrixFormat } from '../formats/index.ts';
import { writeJson } from '../formats/json.ts';
import { type VectorRequest, validateVectorRequest } from '../test-vectors/test-vectors.ts';
import { type VectorForm, vectorFile, vectorForms } from '../test-vectors/vector-files.ts';

/** What a receiver is to be given of a code. */
export interface ReleaseContents {
  /** Matrix formats by id. */
  formats: string[];
  generators: GeneratorForm['id'][];
  /** Block list of the design. */
  blocks: ('text' | 'json')[];
  vectors?: VectorRequest & { forms: VectorForm[] };
}

/** What the files are made from. */
export interface ReleasedCode {
  H: SparseMatrix;
  fingerprint: string;
  title: string;
  /** Absent for an uploaded matrix, which has no blocks to list. */
  design?: DesignSpec;
  /** Written into the JSON matrix and the JSON block list. */
  provenance: Record<string, unknown>;
  /** The snapshot that was signed off, to the byte: its SHA-256 is the digest in the manifest. */
  signOff?: string;
}

export interface PlainFile {
  name: string;
  mediaType: string;
  /** What it is, in a few words. */
  title: string;
  bytes: Uint8Array;
}

export const blockForms = [
  { id: 'text', title: 'block list of the design', extension: 'txt', mediaType: 'text/plain' },
  { id: 'json', title: 'block list of the design, JSON', extension: 'json', mediaType: 'application/json' },
] as const;

/** The files, in a fixed order; the same code and contents give the same bytes.
 *  @throws ParamError naming a format that cannot hold this code; LimitError where a file would be too large. */
export async function releaseFiles(code: ReleasedCode, contents: ReleaseContents): Promise<PlainFile[]> {
  const files: PlainFile[] = [];
  for (const id of contents.formats) {
    const codec = matrixFormat(id);
    if (codec.writes?.(code.H) === false)
      throw new ParamError('formats', id, `formats that hold this matrix; ${codec.title} does not`);
    const bytes = id === 'json' ? writeJson(code.H, code.provenance) : codec.write(code.H);
    const title = `parity-check matrix, ${codec.title}`;
    files.push({ name: `H.${codec.extension}`, mediaType: codec.mediaType, title, bytes });
  }
  for (const id of contents.generators) {
    const form = generatorForms.find((one) => one.id === id)!;
    if (!form.writes(code.H))
      throw new ParamError('generators', id, `descriptions that this code has; it has no ${form.title}`);
    const { extension, title } = form;
    files.push({ name: `generator.${extension}`, mediaType: 'text/plain', title, bytes: form.write(code.H) });
  }
  files.push(...blockFiles(code, contents.blocks));
  if (contents.vectors) files.push(...(await vectorFiles(code, contents.vectors)));
  if (code.signOff !== undefined) {
    const bytes = new TextEncoder().encode(code.signOff);
    files.push({ name: 'sign-off.json', mediaType: 'application/json', title: 'what was signed off', bytes });
  }
  return files;
}

export function writeBlocks(design: DesignSpec, form: 'text' | 'json', provenance: Record<string, unknown>) {
  const built = buildDesign(design);
  return form === 'json' ? writeBlockListJson(built, provenance) : writeBlockListText(built);
}

function blockFiles({ design, provenance }: ReleasedCode, forms: ReleaseContents['blocks']): PlainFile[] {
  if (forms.length > 0 && !design)
    throw new ParamError('blocks', 'asked for', 'none: an uploaded matrix has no design');
  return blockForms
    .filter(({ id }) => forms.includes(id))
    .map(({ id, title, extension, mediaType }) => ({
      ...{ name: `blocks.${extension}`, mediaType, title },
      bytes: writeBlocks(design!, id, provenance),
    }));
}

async function vectorFiles(
  { H, fingerprint, title }: ReleasedCode,
  { forms, ...request }: NonNullable<ReleaseContents['vectors']>,
): Promise<PlainFile[]> {
  validateVectorRequest(H, request);
  const files: PlainFile[] = [];
  for (const form of vectorForms.filter(({ id }) => forms.includes(id))) {
    const pieces: string[] = [];
    for await (const piece of vectorFile(H, request, form.id, { fingerprint, title })) pieces.push(piece);
    const bytes = new TextEncoder().encode(pieces.join(''));
    const { extension, mediaType } = form;
    files.push({ name: `vectors.${extension}`, mediaType, title: `test vectors, ${form.title}`, bytes });
  }
  return files;
}

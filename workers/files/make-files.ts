import { generatorForms } from '@/core/formats/generator-forms.ts';
import { wordForms } from '@/core/formats/word-forms.ts';
import { bundleRelease } from '@/core/release/bundle.ts';
import { releaseFiles, writeBlocks } from '@/core/release/release-files.ts';
import { guaranteedRadius } from '@/core/simulation/guaranteed-radius.ts';
import { runShard } from '@/core/simulation/shard.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import { vectorFile } from '@/core/test-vectors/vector-files.ts';
import { failureOf } from '../failure.ts';
import type { FilesAnswer, FilesRequest } from './api.ts';

const partChars = 1 << 18;

/** Makes what is asked for; an engine error comes back as data. */
export async function makeFiles(request: FilesRequest, onPart: (part: Uint8Array) => void): Promise<FilesAnswer> {
  try {
    switch (request.kind) {
      case 'blocks':
        onPart(writeBlocks(request.design, request.form, request.provenance));
        return { ok: true };
      case 'generator':
        onPart(generatorForms.find(({ id }) => id === request.form)!.write(request.H));
        return { ok: true };
      case 'words':
        onPart(wordForms.find(({ id }) => id === request.form)!.write(request.words));
        return { ok: true };
      case 'vectors':
        await inParts(vectorFile(request.H, request.request, request.form, request.head), onPart);
        return { ok: true };
      case 'shards': {
        const tallies: Tally[] = [];
        for (const { index, ...spec } of request.shards) tallies.push(await runShard({ ...spec, H: request.H }, index));
        return { ok: true, tallies };
      }
      case 'radius':
        return { ok: true, radii: request.decoders.map((decoder) => guaranteedRadius(request.H, decoder)) };
      case 'bundle': {
        const files = await releaseFiles(request.code, request.contents);
        return { ok: true, bundle: await bundleRelease(request.facts, files, request.folder) };
      }
    }
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  }
}

async function inParts(pieces: AsyncIterable<string>, onPart: (part: Uint8Array) => void): Promise<void> {
  let text = '';
  for await (const piece of pieces) {
    text += piece;
    if (text.length < partChars) continue;
    onPart(new TextEncoder().encode(text));
    text = '';
  }
  if (text !== '') onPart(new TextEncoder().encode(text));
}

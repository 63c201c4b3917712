import { createHash } from 'node:crypto';
import { unzipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';
import { LimitError, ParamError } from '@/core/errors.ts';
import { importMatrix, matrixFormats } from '@/core/formats/index.ts';
import { bundleRelease } from '@/core/release/bundle.ts';
import { releaseFiles } from '@/core/release/release-files.ts';
import { everything, exampleCode, exampleFacts } from './example-release.ts';

const make = async () => bundleRelease(exampleFacts, await releaseFiles(exampleCode, everything), 'example-1');
const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

describe('a release bundle', () => {
  test('has the same bytes when made again', async () => {
    const [first, second] = [await make(), await make()];
    expect(second.zipSha256).toBe(first.zipSha256);
    expect(second.zip).toEqual(first.zip);
    expect(sha256(first.zip)).toBe(first.zipSha256);
  });

  test('holds each file in one folder, with the digest and size that the manifest states', async () => {
    const { zip, files } = await make();
    const unpacked = unzipSync(zip);
    expect(Object.keys(unpacked)).toEqual(files.map(({ name }) => `example-1/${name}`));
    const text = (name: string) => new TextDecoder().decode(unpacked[`example-1/${name}`]);
    const manifest = JSON.parse(text('manifest.json'));
    expect(manifest).toMatchObject({ ...exampleFacts });
    expect(manifest.files.map((file: { name: string }) => file.name)).toEqual([
      ...['README.txt', 'H.alist', 'H.mtx', 'H.csv', 'H.json', 'H.npz', 'H.npy', 'H.mat', 'H.h', 'H.qc.txt'],
      ...['generator.polynomial.txt', 'generator.circulants.txt', 'generator.systematic.txt', 'blocks.txt'],
      ...['blocks.json', 'vectors.jsonl', 'vectors.hex.txt', 'verify.py', 'verify.sh'],
    ]);
    for (const { name, sizeBytes, sha256: stated } of manifest.files) {
      expect([unpacked[`example-1/${name}`]!.length, sha256(unpacked[`example-1/${name}`]!)]).toEqual([
        sizeBytes,
        stated,
      ]);
    }
    const sums = text('SHA256SUMS').trimEnd().split('\n');
    expect(sums).toHaveLength(manifest.files.length + 1);
    expect(sums[0]).toBe(`${sha256(unpacked['example-1/manifest.json']!)}  manifest.json`);
  });

  test('holds the very matrix in every format', async () => {
    const { files } = await make();
    for (const { id, extension } of matrixFormats) {
      const { bytes } = files.find(({ name }) => name === `H.${extension}`)!;
      expect(await fingerprint(importMatrix(bytes, id))).toBe(exampleCode.fingerprint);
    }
  });

  test('carries no time of day: every entry has the first date of a zip', async () => {
    const { zip } = await make();
    const view = new DataView(zip.buffer, zip.byteOffset, zip.length);
    let entries = 0;
    for (let at = 0; at + 4 <= zip.length && view.getUint32(at, true) === 0x04034b50; entries++) {
      expect([view.getUint16(at + 10, true), view.getUint16(at + 12, true)]).toEqual([0, 0x21]);
      at += 30 + view.getUint16(at + 26, true) + view.getUint16(at + 28, true) + view.getUint32(at + 18, true);
    }
    expect(entries).toBe(21);
  });

  test('is refused what the code has not: blocks of an upload, circulants of an irregular matrix', async () => {
    const H = matrixFromRows(3, [[0, 1], [2]]);
    const bare = { ...exampleCode, H, design: undefined } as unknown as typeof exampleCode;
    const nothing = { formats: [], generators: [], blocks: [] };
    await expect(releaseFiles(bare, { ...nothing, formats: ['qc'] })).rejects.toThrow(ParamError);
    await expect(releaseFiles(bare, { ...nothing, generators: ['circulants'] })).rejects.toThrow(/no generator by/);
    await expect(releaseFiles(bare, { ...nothing, generators: ['polynomial'] })).rejects.toThrow(ParamError);
    await expect(releaseFiles(bare, { ...nothing, blocks: ['text'] })).rejects.toThrow(/uploaded/);
    const vectors = { ...everything.vectors!, count: 1e7 };
    await expect(releaseFiles(exampleCode, { ...nothing, vectors })).rejects.toThrow(LimitError);
  });
});

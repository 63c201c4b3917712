import { execFileSync } from 'node:child_process';
import { closeSync, mkdtempSync, openSync, rmSync, statSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type Large, largeFiles } from './upload-memory/large-files.ts';

const folder = mkdtempSync(join(tmpdir(), 'blockwright-upload-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function write({ name, parts }: Large): string {
  const path = join(folder, name);
  const file = openSync(path, 'w');
  for (const part of parts()) writeSync(file, typeof part === 'string' ? new TextEncoder().encode(part) : part);
  closeSync(file);
  return path;
}

/** The reader as it is shipped, in one file of JavaScript: a compiler in the process would count as memory of the upload. */
beforeAll(async () => {
  await build({
    configFile: false,
    logLevel: 'error',
    build: {
      ssr: fileURLToPath(new URL('./upload-memory/read-file.ts', import.meta.url)),
      outDir: folder,
      emptyOutDir: false,
      rollupOptions: { output: { entryFileNames: 'read-file.mjs' } },
    },
    ssr: { noExternal: true },
  });
});

function read(path: string): { ones: number; elapsedMs: number; before: number; mostMb: number } {
  const answer = JSON.parse(
    execFileSync(process.execPath, [join(folder, 'read-file.mjs'), path], { encoding: 'utf8' }),
  );
  console.log(`${path.split('/').at(-1)}: ${(statSync(path).size / 1e6).toFixed(0)} MB, ${JSON.stringify(answer)}`);
  return answer;
}

describe('a file of about 200 MB is read in less than 300 MB', () => {
  test.each(largeFiles.map((file) => [file.what, file] as const))('%s', (_, file) => {
    const path = write(file);
    const { size } = statSync(path);
    expect(size).toBeGreaterThan(file.leastBytes ?? 180_000_000);
    expect(size).toBeLessThanOrEqual(200_000_000);
    const { ones, mostMb } = read(path);
    rmSync(path);
    expect(ones).toBe(file.ones);
    expect(mostMb).toBeLessThan(300);
  });
});

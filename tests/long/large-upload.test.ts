import { execFileSync } from 'node:child_process';
import { closeSync, mkdtempSync, openSync, rmSync, statSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, expect, test } from 'vitest';

const folder = mkdtempSync(join(tmpdir(), 'blockwright-upload-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Ones of a matrix of 40 000 rows, spread by a step that is prime to the columns. */
const rows = 40_000;
const cols = 65_793;
const perRow = 430;
const column = (row: number, e: number) => (row * 7919 + e * 151) % cols;

function writeFile(name: string, head: string, lineOf: (row: number, e: number) => string): string {
  const path = join(folder, name);
  const file = openSync(path, 'w');
  writeSync(file, head);
  for (let row = 0; row < rows; row++) {
    let text = '';
    for (let e = 0; e < perRow; e++) text += lineOf(row, e);
    writeSync(file, text);
  }
  closeSync(file);
  return path;
}

function read(path: string): { ones: number; elapsedMs: number; mostMb: number } {
  const script = fileURLToPath(new URL('./upload-memory/read-file.ts', import.meta.url));
  const answer = JSON.parse(execFileSync(process.execPath, ['--import', 'tsx', script, path], { encoding: 'utf8' }));
  console.log(`${path.split('/').at(-1)}: ${(statSync(path).size / 1e6).toFixed(0)} MB, ${JSON.stringify(answer)}`);
  return answer;
}

test.each([
  [
    'a Matrix Market file',
    'large.mtx',
    `%%MatrixMarket matrix coordinate pattern general\n${rows} ${cols} ${rows * perRow}\n`,
    (row: number, e: number) => `${row + 1} ${column(row, e) + 1}\n`,
  ],
  [
    'a CSV file',
    'large.csv',
    `# rows=${rows} columns=${cols} counted-from=0\nrow,column\n`,
    (row: number, e: number) => `${row},${column(row, e)}\n`,
  ],
])('%s of about 200 MB is read in less than 300 MB', (_, name, head, lineOf) => {
  const path = writeFile(name, head, lineOf);
  expect(statSync(path).size).toBeGreaterThan(190_000_000);
  expect(statSync(path).size).toBeLessThan(200_000_000);
  const { ones, mostMb } = read(path);
  expect(ones).toBe(rows * perRow);
  expect(mostMb).toBeLessThan(300);
});

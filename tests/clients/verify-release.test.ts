import { spawnSync } from 'node:child_process';
import { appendFileSync, mkdirSync, mkdtempSync, readFileSync, rmSync, unlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { unzipSync } from 'fflate';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import { bundleRelease } from '@/core/release/bundle.ts';
import { releaseFiles } from '@/core/release/release-files.ts';
import { everything, exampleCode, exampleFacts } from '../core/release/example-release.ts';

const { zip } = await bundleRelease(exampleFacts, await releaseFiles(exampleCode, everything), 'example-1');
const scratch = mkdtempSync(join(tmpdir(), 'blockwright-verify-'));
afterAll(() => rmSync(scratch, { recursive: true, force: true }));

const folder = join(scratch, 'example-1');
beforeEach(() => {
  rmSync(folder, { recursive: true, force: true });
  for (const [name, bytes] of Object.entries(unzipSync(zip))) {
    mkdirSync(dirname(join(scratch, name)), { recursive: true });
    writeFileSync(join(scratch, name), bytes);
  }
});

const at = (name: string) => join(folder, name);
const replace = (name: string, from: string | RegExp, to: string) =>
  writeFileSync(at(name), readFileSync(at(name), 'utf8').replace(from, to));

function run(script: string): { code: number | null; said: string } {
  const program = script.endsWith('.py') ? 'python3' : 'sh';
  const { status, stdout, stderr } = spawnSync(program, [at(script)], { encoding: 'utf8', cwd: tmpdir() });
  return { code: status, said: stdout + stderr };
}

describe.each(['verify.py', 'verify.sh'])('%s', (script) => {
  test('passes a bundle as it was made', () => {
    const { code, said } = run(script);
    expect([code, said]).toEqual([0, expect.stringMatching(/everything agrees\n$/)]);
    expect(said).not.toMatch(/WRONG/);
  });

  const spoilt: [string, () => void, RegExp][] = [
    ['one byte more', () => appendFileSync(at('H.npz'), 'x'), /WRONG\s+H\.npz/],
    ['one bit of a matrix turned', () => replace('H.alist', '1 ', '2 '), /WRONG\s+H\.alist/],
    ['a file that is gone', () => unlinkSync(at('blocks.txt')), /WRONG\s+blocks\.txt: missing/],
    ['a manifest that was edited', () => replace('manifest.json', 'Example', 'Exemple'), /WRONG\s+manifest\.json/],
    ['a digest that was edited to fit', () => replace('SHA256SUMS', /^\w{64}(?= {2}H\.mtx)/m, '0'.repeat(64)), /WRONG/],
    ['a line of digests taken out', () => replace('SHA256SUMS', /^.* H\.csv\n/m, ''), /WRONG/],
  ];
  test.each(spoilt)('refuses %s', (_what, spoil, words) => {
    spoil();
    const { code, said } = run(script);
    expect(code).toBe(1);
    expect(said).toMatch(words);
  });
});

test('verify.py finds another matrix under digests that were made to fit', () => {
  const lines = readFileSync(at('H.alist'), 'utf8').split('\n');
  // The last two row lists change places: a valid file, another matrix by its fingerprint.
  [lines[lines.length - 3], lines[lines.length - 2]] = [lines[lines.length - 2]!, lines[lines.length - 3]!];
  writeFileSync(at('H.alist'), lines.join('\n'));
  const sum = (name: string) => spawnSync('sha256sum', [at(name)], { encoding: 'utf8' }).stdout.slice(0, 64);
  const before = /^(\w{64}) {2}H\.alist$/m.exec(readFileSync(at('SHA256SUMS'), 'utf8'))![1]!;
  for (const name of ['manifest.json', 'SHA256SUMS']) replace(name, before, sum('H.alist'));
  replace('SHA256SUMS', /^\w{64}(?= {2}manifest\.json)/m, sum('manifest.json'));
  const { code, said } = run('verify.py');
  expect([code, said]).toEqual([1, expect.stringMatching(/WRONG\s+fingerprint/)]);
});

test('Python recomputes every syndrome of the hexadecimal vectors from the alist file', () => {
  const script = `
import sys
numbers = list(map(int, open(sys.argv[1]).read().split()))
cols, rows, wc, wr = numbers[:4]
at = 4 + cols + rows + cols * wc
H = [[c - 1 for c in numbers[at + i * wr:at + (i + 1) * wr] if c] for i in range(rows)]
def word(text, n): return [int(b) for d in text for b in format(int(d, 16), '04b')][:n]
frames, now = 0, {}
for line in open(sys.argv[2]):
    if line.startswith('#') or '=' in line: continue
    name, value = line.split()[:2]
    now[name] = value
    if name == 'syndrome':
        received, sent = word(now['received'], cols), word(now['codeword'], cols)
        assert [sum(received[c] for c in row) % 2 for row in H] == word(value, rows)
        assert not any(sum(sent[c] for c in row) % 2 for row in H)
        assert [a ^ b for a, b in zip(received, sent)] == word(now['error'], cols)
        frames += 1
    if name.startswith('decoder-'):
        parts = line.split()
        output = word(parts[parts.index('output') + 1], cols)
        assert sum(a != b for a, b in zip(output, sent)) == int(parts[parts.index('bit-errors') + 1])
        assert (not any(sum(output[c] for c in row) % 2 for row in H)) == bool(int(parts[parts.index('converged') + 1]))
print(frames)
`;
  const done = spawnSync('python3', ['-c', script, at('H.alist'), at('vectors.hex.txt')], { encoding: 'utf8' });
  expect([done.status, done.stdout.trim(), done.stderr]).toEqual([0, '25', '']);
});

import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { root, scratchDir } from './built-server.ts';

/** Runs the check of the environment in a process of its own, as the entry does. */
function prepare(env: Record<string, string>) {
  const script = `import { prepareEnvironment } from './src/server/environment.mjs';
    try { const s = prepareEnvironment(); console.log(JSON.stringify({ ...s, secret: process.env.AUTH_SECRET })); }
    catch (error) { console.log(JSON.stringify({ refused: error.message })); }`;
  const { stdout } = spawnSync(process.execPath, ['--input-type=module', '-e', script], {
    cwd: root,
    env: { PATH: process.env.PATH, ...env },
    encoding: 'utf8',
  });
  return JSON.parse(stdout);
}

const secret = 's'.repeat(32);

describe('the environment', () => {
  it('of local mode makes a secret once, readable by its owner alone', () => {
    const DATA_DIR = join(scratchDir(), 'made');
    const first = prepare({ DATA_DIR });
    expect(first).toMatchObject({ host: '127.0.0.1', port: 4321, dataDir: DATA_DIR });
    expect(statSync(join(DATA_DIR, 'secret')).mode & 0o777).toBe(0o600);
    expect(first.secret.length).toBeGreaterThanOrEqual(32);
    expect(prepare({ DATA_DIR }).secret).toBe(first.secret);
    expect(readFileSync(join(DATA_DIR, 'secret'), 'utf8').trim()).toBe(first.secret);
  });

  it('of production takes its secret from AUTH_SECRET and makes no file', () => {
    const DATA_DIR = scratchDir();
    const settings = prepare({ DATA_DIR, PUBLIC_URL: 'https://bench.example.test', AUTH_SECRET: secret });
    expect(settings).toMatchObject({ secret, publicUrl: 'https://bench.example.test/' });
    expect(existsSync(join(DATA_DIR, 'secret'))).toBe(false);
  });

  it.each([
    [{ DATA_DIR: '' }, /DATA_DIR: got "".*no setting for/],
    [{ DATA_DIR: '  ' }, /DATA_DIR/],
    [{ PORT: 'http' }, /PORT: got "http".*0 to 65535/],
    [{ PORT: '70000' }, /PORT/],
    [{ HOST: '0.0.0.0' }, /HOST: got "0.0.0.0".*need PUBLIC_URL/],
    [{ PUBLIC_URL: '', AUTH_SECRET: secret }, /PUBLIC_URL: got "".*https/],
    [{ PUBLIC_URL: 'bench.example.test', AUTH_SECRET: secret }, /PUBLIC_URL.*https/],
    [{ PUBLIC_URL: 'http://bench.example.test', AUTH_SECRET: secret }, /PUBLIC_URL.*https/],
    [{ PUBLIC_URL: 'https://bench.example.test/path', AUTH_SECRET: secret }, /PUBLIC_URL.*without a path/],
    [{ PUBLIC_URL: 'https://bench.example.test' }, /AUTH_SECRET.*at least 32/],
    [{ PUBLIC_URL: 'https://bench.example.test', AUTH_SECRET: 'short' }, /AUTH_SECRET.*at least 32/],
  ])('of %o is refused with what would be accepted', (env, message) => {
    expect(prepare({ DATA_DIR: scratchDir(), ...env }).refused).toMatch(message);
  });

  it('with a data folder that is a file is refused', () => {
    const file = join(scratchDir(), 'file');
    writeFileSync(file, '');
    expect(prepare({ DATA_DIR: file }).refused).toMatch(/DATA_DIR/);
  });

  it('with an emptied secret file is refused rather than signed with nothing', () => {
    const DATA_DIR = scratchDir();
    mkdirSync(DATA_DIR, { recursive: true });
    writeFileSync(join(DATA_DIR, 'secret'), '');
    expect(prepare({ DATA_DIR }).refused).toMatch(/holds no secret/);
  });
});

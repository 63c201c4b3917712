// `npm test`: sets up what the tests need, runs every kind of test, and ends with the count on a line of its own.
// Plain Node without packages, because it must run before they are installed.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { installIfStale } from '../src/server/start/start.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const reports = mkdtempSync(join(tmpdir(), 'blockwright-tests-'));
const vitestEntry = 'node_modules/vitest/vitest.mjs';
const totals = { passed: 0, failed: 0 };

function run(title, command, args, env = {}) {
  return new Promise((done) => {
    const from = Date.now();
    console.log(`\n— ${title}`);
    const child = spawn(command, args, {
      cwd: root,
      stdio: ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, ...env },
    });
    child.on('error', () => done(false));
    child.on('exit', (code) => {
      console.log(`  ${title}: ${code === 0 ? 'passed' : 'FAILED'} in ${((Date.now() - from) / 1000).toFixed(0)} s`);
      done(code === 0);
    });
  });
}

/** A check without a count of its own counts as one test. */
async function check(title, command, args) {
  const good = await run(title, command, args);
  totals[good ? 'passed' : 'failed'] += 1;
}

async function vitest(title, project) {
  const report = join(reports, `${project}.json`);
  const args = [
    vitestEntry,
    'run',
    '--config',
    'tests/vitest.config.ts',
    '--project',
    project,
    '--reporter=default',
    '--reporter=json',
  ];
  const good = await run(title, process.execPath, [...args, `--outputFile.json=${report}`]);
  if (!existsSync(report)) {
    totals.failed += 1;
    return;
  }
  const { numPassedTests, numFailedTests, numPendingTests } = JSON.parse(readFileSync(report, 'utf8'));
  totals.passed += numPassedTests;
  // A skipped test is one nobody sees, and a run that fails outside any test has failed all the same.
  totals.failed += numFailedTests + numPendingTests || (good ? 0 : 1);
}

/** Installs Debian packages where this process may; what is missing afterwards is for the caller to see. */
function install(packages) {
  const mayInstall = process.getuid?.() === 0 && spawnSync('apt-get', ['--version']).status === 0;
  if (!mayInstall) return;
  console.log(`Installing ${packages.join(', ')} with apt-get (once).`);
  const options = {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  };
  spawnSync('apt-get', ['update', '-qq'], options);
  spawnSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...packages], options);
}

/** A program without which some tests cannot run: what is missing counts as a failure. */
function ensure(packageName, path, what) {
  if (existsSync(path)) return true;
  install([packageName]);
  if (existsSync(path)) return true;
  console.error(`${what}: apt-get install ${packageName}`);
  totals.failed += 1;
  return false;
}

/** The programs that load our exports: CI installs them; elsewhere what is missing is said, and how to add it. */
function ensureClients() {
  const wanted = [
    ['python3-scipy', '/usr/lib/python3/dist-packages/scipy'],
    ['octave', '/usr/bin/octave-cli'],
    ['gap-core', '/usr/bin/gap'],
    ['gcc', '/usr/bin/gcc'],
  ];
  const missing = () => wanted.filter(([, path]) => !existsSync(path)).map(([name]) => name);
  if (process.env.CI && missing().length > 0) install(missing());
  const left = missing();
  if (left.length > 0)
    console.log(`Left out: loading exports with ${left.join(', ')}. To add: apt-get install ${left.join(' ')}`);
  return left.length < wanted.length;
}

installIfStale();
await check('types', process.execPath, ['node_modules/astro/astro.js', 'check', '--minimumFailingSeverity', 'warning']);
await check('lint', process.execPath, ['node_modules/@biomejs/biome/bin/biome', 'ci', '.']);
await check('build', process.execPath, ['src/server/start/start.mjs', '--build-only']);
await vitest('engine', 'core');
ensure('redis-server', '/usr/bin/redis-server', 'The tests of the fleet need Redis');
await vitest('server and client', 'server');
await vitest('components', 'components');
if (ensureClients()) await vitest('programs that load our files', 'clients');
if (ensure('chromium', '/usr/bin/chromium', 'The browser tests need Chromium')) await vitest('browser', 'browser');

rmSync(reports, { recursive: true, force: true });
console.log(`\n${totals.passed} passed, ${totals.failed} failed`);
process.exitCode = totals.failed === 0 ? 0 : 1;

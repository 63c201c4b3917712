// `npm start` on a fresh clone and ever after: installs when the lock has changed, builds when a source has, then
// serves; the server itself migrates the database and seeds the demo. Plain JavaScript without dependencies, because
// it runs before they are there.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, lstatSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const sources = ['src', 'workers', 'public', 'db', 'astro.config.mjs', 'package-lock.json', 'tsconfig.json'];
const installStamp = join(root, 'node_modules', '.blockwright-lock');
const buildStamp = join(root, 'dist', '.blockwright-sources');

/** Whether node_modules was made from the present lock file. npm writes its own copy of the lock after an install. */
function installIsStale() {
  // Lent by another checkout: installing would empty that one's.
  if (lstatSync(join(root, 'node_modules'), { throwIfNoEntry: false })?.isSymbolicLink()) return false;
  const npmCopy = join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(npmCopy)) return true;
  const lock = readFileSync(join(root, 'package-lock.json'), 'utf8');
  if (existsSync(installStamp)) return readFileSync(installStamp, 'utf8') !== digestOf(lock);
  return statSync(npmCopy).mtimeMs < statSync(join(root, 'package-lock.json')).mtimeMs;
}

const digestOf = (text) => createHash('sha256').update(text).digest('hex');

/** Names, sizes and times of every source file, digested; contents are not read, so this takes milliseconds. */
function sourcesDigest() {
  const lines = [];
  const visit = (path) => {
    const stat = statSync(path, { throwIfNoEntry: false });
    if (!stat) return;
    if (stat.isDirectory()) for (const name of readdirSync(path).sort()) visit(join(path, name));
    else lines.push(`${path.slice(root.length)} ${stat.size} ${stat.mtimeMs}`);
  };
  for (const source of sources) visit(join(root, source));
  return digestOf(lines.join('\n'));
}

function run(command, args, what, env = {}) {
  console.log(what);
  const { status, error } = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, ASTRO_TELEMETRY_DISABLED: '1', ...env },
  });
  if (status === 0) return;
  console.error(error?.message ?? `${command} ${args.join(' ')} ended with status ${status}.`);
  process.exit(1);
}

export function installIfStale() {
  if (!installIsStale()) return;
  const what = 'Installing (npm ci compiles SQLite: two to three minutes; needs python3, make and a C++ compiler) …';
  run('npm', ['ci', '--no-audit', '--no-fund'], what);
  writeFileSync(installStamp, digestOf(readFileSync(join(root, 'package-lock.json'), 'utf8')));
}

export function buildIfStale() {
  const digest = sourcesDigest();
  const built = existsSync(join(root, 'dist', 'server', 'entry.mjs')) && existsSync(buildStamp);
  if (built && readFileSync(buildStamp, 'utf8') === digest) return;
  const build = [join(root, 'node_modules', 'astro', 'astro.js'), 'build'];
  // A NODE_ENV of the caller's, such as a test runner's, would make React's development markup for the production runtime.
  run(process.execPath, build, 'Building …', { NODE_ENV: 'production' });
  mkdirSync(dirname(buildStamp), { recursive: true });
  writeFileSync(buildStamp, digest);
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  installIfStale();
  buildIfStale();
  // `npm run build` stops here.
  if (!process.argv.includes('--build-only')) await import('../main.mjs');
}

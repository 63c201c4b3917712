import { type ChildProcess, execFile, spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdirSync, mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';

export const root = fileURLToPath(new URL('../..', import.meta.url));

const lock = join(tmpdir(), `blockwright-build-${createHash('sha256').update(root).digest('hex').slice(0, 12)}`);
const lockIsStaleMs = 10 * 60_000;

/** Builds when a source has changed since; test files that run at once wait for one another. */
export async function ensureBuilt(): Promise<void> {
  for (;;) {
    try {
      mkdirSync(lock);
      break;
    } catch {
      const since = statSync(lock, { throwIfNoEntry: false })?.mtimeMs ?? 0;
      if (since > 0 && Date.now() - since > lockIsStaleMs) rmSync(lock, { recursive: true, force: true });
      await delay(200);
    }
  }
  try {
    await promisify(execFile)(process.execPath, ['src/server/start/start.mjs', '--build-only'], {
      cwd: root,
      maxBuffer: 2 ** 26,
    });
  } finally {
    rmSync(lock, { recursive: true, force: true });
  }
}

export interface RunningServer {
  base: string;
  dataDir: string;
  process: ChildProcess;
  /** Ends it in order. */
  stop(): Promise<void>;
  /** Ends it as a power cut would. */
  kill(): Promise<void>;
}

/** A folder of its own, gone when the test process ends. */
export function scratchDir(): string {
  const dir = mkdtempSync(join(tmpdir(), 'blockwright-test-'));
  process.once('exit', () => rmSync(dir, { recursive: true, force: true }));
  return dir;
}

/** Most tests hand in made-up tallies, which the server would find out by computing them again. */
const inTests = { RECHECK_SHARE: '0', SIMULATION_THREADS: '1' };

/** Starts the built server on a free port with its own data folder. */
export async function startServer(env: Record<string, string> = {}): Promise<RunningServer> {
  await ensureBuilt();
  const dataDir = env.DATA_DIR ?? scratchDir();
  const { PUBLIC_URL: _url, AUTH_SECRET: _secret, ...inherited } = process.env;
  const child = spawn(process.execPath, ['src/server/main.mjs'], {
    cwd: root,
    env: { ...inherited, NODE_ENV: 'production', PORT: '0', DATA_DIR: dataDir, ...inTests, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  process.once('exit', () => child.kill('SIGKILL'));
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  const base = await listeningAddress(child);
  const end = async (signal: NodeJS.Signals) => {
    child.kill(signal);
    await ended;
  };
  return { base, dataDir, process: child, stop: () => end('SIGTERM'), kill: () => end('SIGKILL') };
}

function listeningAddress(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let log = '';
    const read = (chunk: Buffer) => {
      log += chunk;
      const address = /listens on (http:\S+)/.exec(log)?.[1];
      if (address) resolve(address);
    };
    child.stdout?.on('data', read);
    child.stderr?.on('data', read);
    child.once('exit', (code) => reject(new Error(`The server ended with ${code} before it listened:\n${log}`)));
  });
}

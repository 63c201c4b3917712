import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { root } from '../server/built-server.ts';

const program = '/usr/bin/redis-server';

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const { port } = server.address() as { port: number };
  await new Promise((resolve) => server.close(resolve));
  return port;
}

/** A Redis of its own on a free port, that can be ended and started again with what it had saved, or with nothing. */
export async function startRedis() {
  if (!existsSync(program)) throw new Error('These tests need Redis: apt-get install redis-server');
  const port = await freePort();
  const dir = mkdtempSync(join(tmpdir(), 'blockwright-redis-'));
  let child: ChildProcess | undefined;

  const start = async () => {
    const settings = ['--port', String(port), '--bind', '127.0.0.1', '--dir', dir, '--appendonly', 'yes', '--save', ''];
    child = spawn(program, settings, { stdio: ['ignore', 'pipe', 'ignore'] });
    await new Promise<void>((resolve, reject) => {
      child!.stdout!.on('data', (chunk) => String(chunk).includes('Ready to accept connections') && resolve());
      child!.once('exit', (code) => reject(new Error(`redis-server ended with ${code}`)));
    });
  };
  const stop = async () => {
    const ended = new Promise((resolve) => child!.once('exit', resolve));
    child!.kill('SIGKILL');
    await ended;
  };
  process.once('exit', () => child?.kill('SIGKILL'));
  await start();
  return {
    url: `redis://127.0.0.1:${port}`,
    start,
    stop,
    forget: () => rmSync(join(dir, 'appendonlydir'), { recursive: true, force: true }),
    async end() {
      await stop();
      rmSync(dir, { recursive: true, force: true });
    },
  };
}

export interface FleetProcess {
  process: ChildProcess;
  said: () => string;
  ended: Promise<number | null>;
  kill(): Promise<void>;
}

/** A process of the fleet, as `npm run fleet` starts it. */
export function joinFleet(redisUrl: string, env: Record<string, string> = {}): FleetProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'src/server/fleet/join.ts'], {
    cwd: root,
    env: {
      ...process.env,
      REDIS_URL: redisUrl,
      SIMULATION_THREADS: '1',
      FLEET_NAME: 'a machine',
      FLEET_LOCK_MS: '1000',
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  process.once('exit', () => child.kill('SIGKILL'));
  let text = '';
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk) => (text += chunk));
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve));
  return {
    process: child,
    said: () => text,
    ended,
    async kill() {
      child.kill('SIGKILL');
      await ended;
    },
  };
}

export const seconds = (count: number) => delay(count * 1000);

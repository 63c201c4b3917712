import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

/** Programs that users load our files with, each with the Debian package that brings it. */
export const clients = {
  scipy: { package: 'python3-scipy', present: () => runs('/usr/bin/python3', ['-c', 'import scipy.sparse']) },
  octave: { package: 'octave', present: () => existsSync('/usr/bin/octave-cli') },
  gap: { package: 'gap-core', present: () => existsSync('/usr/bin/gap') },
  cc: { package: 'gcc', present: () => runs('cc', ['--version']) },
} as const;

function runs(command: string, args: readonly string[]): boolean {
  return spawnSync(command, args, { stdio: 'ignore' }).status === 0;
}

/** Standard output of a program, trimmed.
 *  @throws Error with what it said when it fails. */
export function output(command: string, args: readonly string[], input?: string): string {
  const done = spawnSync(command, args, { encoding: 'utf8', input, maxBuffer: 64 * 1024 * 1024, timeout: 120_000 });
  if (done.status !== 0) throw new Error(`${command} failed: ${done.stderr || done.error?.message}`);
  return done.stdout.trim();
}

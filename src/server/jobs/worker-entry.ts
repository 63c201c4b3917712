import { join } from 'node:path';

/** The file of a job's Node worker: bundled beside the built server, or the source itself through tsx elsewhere. */
export function workerEntry(job: 'build'): { file: string; execArgv: string[] } {
  const bundled = !import.meta.url.endsWith('.ts');
  if (bundled) return { file: join(process.cwd(), 'dist', 'server', 'workers', `${job}.mjs`), execArgv: [] };
  return { file: join(process.cwd(), 'workers', job, 'node.ts'), execArgv: ['--import', 'tsx'] };
}

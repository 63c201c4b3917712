import { join } from 'node:path';
import { type ResourceLimits, Worker } from 'node:worker_threads';

/** Jobs that have a Node worker, each a folder of workers/ and an entry in astro.config.mjs. */
export type NodeJob = 'build' | 'examine' | 'files' | 'upload';

/** Starts a job's Node worker: the file bundled beside the built server, or the TypeScript source through tsx when the
 *  server itself runs from its sources (development, tests). */
export function startWorker(job: NodeJob, resourceLimits: ResourceLimits): Worker {
  const bundled = !import.meta.url.endsWith('.ts');
  if (bundled) return new Worker(join(process.cwd(), 'dist', 'server', 'workers', `${job}.mjs`), { resourceLimits });
  const source = JSON.stringify(join(process.cwd(), 'workers', job, 'node.ts'));
  // A worker of Node.js 20 does not inherit tsx from `--import`; it has to register it for itself.
  const code = `import('tsx/esm/api').then(({ register }) => (register(), import(${source})))`;
  return new Worker(code, { eval: true, execArgv: [], resourceLimits });
}

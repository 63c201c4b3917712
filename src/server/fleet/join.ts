// `npm run fleet`: joins the fleet of the server that uses the same REDIS_URL, from any machine with the same release.
import { hostname } from 'node:os';
import { redisUrl, workerThreads } from '../config.ts';
import { createSimulationPool } from '../jobs/simulation-pool.ts';
import { programVersion } from '../version.ts';
import { Machine } from './machine.ts';

const url = redisUrl();
if (!url || !URL.canParse(url) || !/^rediss?:$/.test(new URL(url).protocol)) {
  const given = url ? `got ${url.replace(/\/\/.*@/, '//…@')}` : 'nothing is set';
  console.error(`REDIS_URL: ${given}; accepted is the address of the server’s Redis, such as redis://10.0.0.5:6379.`);
  process.exit(1);
}
const machine = new Machine({
  redisUrl: url,
  name: process.env.FLEET_NAME || hostname(),
  // For trying out what a machine of another release is told.
  release: process.env.FLEET_RELEASE || programVersion,
  pool: createSimulationPool(workerThreads()),
  ...(process.env.FLEET_LOCK_MS && { lockMs: Number(process.env.FLEET_LOCK_MS) }),
  say: (line) => console.log(line),
});
for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => void machine.close().then(() => process.exit(0)));
}
void machine.left.then(async () => {
  await machine.close();
  process.exit(2);
});
await machine.join();

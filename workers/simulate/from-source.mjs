// For a server that runs from its sources: a worker thread of Node.js 20 does not inherit tsx from `--import`.
import { register } from 'tsx/esm/api';

register();
const { default: shard } = await import('./node.ts');
export default shard;

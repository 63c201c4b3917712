// The simulation worker, whose thread ends without an answer at shard 1.
import { register } from 'tsx/esm/api';

register();
const { default: shard } = await import('../../workers/simulate/node.ts');
export default (task) => (task.index === 1 ? process.exit(7) : shard(task));

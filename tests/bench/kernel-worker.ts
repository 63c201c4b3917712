// A process that decodes shards of PG(2,16) as it is told and answers with the frame errors.
import { buildDesign, type Channel, type DecoderSpec, deriveLdpc } from '../../src/core/index.ts';
import { fastShard } from '../../src/core/kernels/index.ts';

export interface ShardOrder {
  index: number;
  framesPerShard: number;
  channel: Channel;
  decoder: DecoderSpec;
}

const { H } = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 16 } }), { checks: 'blocks' });

process.on('message', async ({ index, ...order }: ShardOrder) => {
  const tally = await fastShard({ H, seed: 'bench', ...order }, index);
  process.send?.(tally?.frameErrors);
});

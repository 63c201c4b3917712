import { expose, transfer } from 'comlink';
import { createAnalyseApi } from './analyse.ts';
import type { AnalyseApi, OpenAnswer } from './api.ts';

const service = createAnalyseApi();
const api: AnalyseApi = { ...service, open: async (...request) => handOver(await service.open(...request)) };
expose(api);

/** Copies the blocks here and gives the copy away, so that the page's thread does not stop to copy millions of them. */
function handOver(answer: OpenAnswer): OpenAnswer {
  if (!answer.ok) return answer;
  const { design } = answer.opened;
  const blockStart = design.blockStart.slice();
  const blockPoints = design.blockPoints.slice();
  const given = { ...answer, opened: { ...answer.opened, design: { ...design, blockStart, blockPoints } } };
  return transfer(given, [blockStart.buffer, blockPoints.buffer]);
}

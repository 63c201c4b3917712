import { expose, transfer } from 'comlink';
import type { BuildAnswer, BuildApi } from './api.ts';
import { buildCode } from './build-code.ts';

const api: BuildApi = { build: async (...request) => handOver(await buildCode(...request)) };
expose(api);

/** Copies the matrix here and gives the copy away, so that the page's thread does not stop to copy it. */
function handOver(answer: BuildAnswer): BuildAnswer {
  if (!answer.ok) return answer;
  const { H } = answer.built;
  const rowStart = H.rowStart.slice();
  const colIndex = H.colIndex.slice();
  const built = { ...answer.built, H: { ...H, rowStart, colIndex } };
  return transfer({ ...answer, built }, [rowStart.buffer, colIndex.buffer]);
}

import { csvLine } from '@/api/csv-line.ts';
import type { Point, Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pointsOfRunPage, type StoredPoint } from '../../repositories/points.ts';
import { runToRead } from './run-access.ts';
import { shownPoint } from './shown-point.ts';

/** Read at a time, so that a run of 100 000 points is never held whole. */
const pointsAPage = 500;

/** Heads of the file and how each cell is made. Channel and decoder are JSON, as the interface takes them. */
const columns: readonly (readonly [head: string, cell: (point: Point, run: Run) => string])[] = [
  ['run', (_, run) => run.name],
  ['seed', (_, run) => run.seed],
  ['point id', (point) => point.id],
  ['code id', (point) => point.codeId],
  ['code', (point) => point.codeLabel],
  ['n', (point) => String(point.n)],
  ['k', (point) => String(point.k)],
  ['channel', (point) => JSON.stringify(point.channel)],
  ['decoder', (point) => JSON.stringify(point.decoder)],
  ['frames', ({ tally }) => String(tally.frames)],
  ['frame errors', ({ tally }) => String(tally.frameErrors)],
  ['bit errors', ({ tally }) => String(tally.bitErrors)],
  ['undetected', ({ tally }) => String(tally.undetected)],
  ['bits', ({ tally }) => String(tally.bits)],
  ['iterations', ({ tally }) => String(tally.iterations)],
  ['FER', ({ tally, fer }) => (tally.frameErrors > 0 ? String(fer) : '')],
  ['FER lower', ({ tally, interval }) => (tally.frameErrors > 0 ? String(interval.lower) : '')],
  ['FER upper', ({ interval }) => String(interval.upper)],
  ['BER', ({ tally, ber }) => (tally.frameErrors > 0 ? String(ber) : '')],
  ['BER lower', ({ tally, berInterval }) => (tally.frameErrors > 0 ? String(berInterval.lower) : '')],
  ['BER upper', ({ berInterval }) => String(berInterval.upper)],
  ['level', (point) => String(point.level)],
  ['done', (point) => (point.done ? 'yes' : 'no')],
  ['evidence', () => 'sampled'],
  ['mark', ({ tally }) => (tally.frames === 0 ? 'not measured' : tally.frameErrors === 0 ? 'upper limit only' : '')],
];

/** The points of a run as CSV. Rights are checked before the first byte. A rate of which no error was seen is left
 *  empty and only its upper limit given: a reader of the file must not take it for 0. */
export async function pointsCsv(context: Context, runId: string): Promise<ReadableStream<Uint8Array>> {
  const run = await runToRead(context, runId);
  const lines = csvChunks(context, run);
  const encoder = new TextEncoder();
  return new ReadableStream({
    async pull(controller) {
      const { value, done } = await lines.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
  });
}

async function* csvChunks({ db }: Context, run: Run): AsyncGenerator<string> {
  yield csvLine(columns.map(([head]) => head));
  let after: string | undefined;
  for (;;) {
    const page: StoredPoint[] = await pointsOfRunPage(db, run.id, { ...(after && { after }), limit: pointsAPage });
    if (page.length === 0) return;
    yield page.map((point) => csvLine(columns.map(([, cell]) => cell(shownPoint(point, []), run)))).join('');
    after = page.at(-1)!.id;
  }
}

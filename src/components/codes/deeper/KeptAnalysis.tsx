import type { Analysis } from '@/api/analyses.ts';
import { endpoints } from '@/api/endpoints.ts';
import { addressOf } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted, duration } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { RefusalNotice } from '../RefusalNotice.tsx';
import { Compared, Histogram } from './AnswerBlock.tsx';
import type { KeptState } from './use-kept-analysis.ts';

interface Props {
  title: string;
  kept: KeptState;
  onCancel: () => void;
}

/** How an analysis on the server stands. */
export function KeptAnalysis({ title, kept, onCancel }: Props) {
  if (kept.state === 'idle') return null;
  if (kept.state === 'refused') return <RefusalNotice refusal={kept.refusal} />;
  if (kept.state === 'working') {
    return (
      <div className="flex flex-wrap items-center gap-3">
        <div className="w-60 max-w-full">
          <Progress
            label={`On the server: ${title}`}
            value={kept.analysis?.share ?? null}
            left="on the server; goes on when this page is left"
          />
        </div>
        <Button size="small" onClick={onCancel} aria-label={`Cancel on the server: ${title}`}>
          Cancel
        </Button>
      </div>
    );
  }
  const { analysis } = kept;
  if (analysis.state === 'failed') {
    return (
      <Notice kind="fail" word="Nothing kept" live>
        {analysis.error?.message}
      </Notice>
    );
  }
  const news = analysis.improved.length;
  return (
    <Notice
      kind="note"
      word={news > 0 ? 'Kept' : 'Nothing new'}
      live
      action={
        news > 0 && (
          <Button size="small" onClick={() => location.reload()}>
            Show on the sheet
          </Button>
        )
      }
    >
      {news > 0
        ? `${counted(news, 'property', 'properties')} of the code added or narrowed.`
        : 'The code’s properties say as much already, so they stay.'}
    </Notice>
  );
}

/** An earlier analysis that told something: who asked, with which budget, how long it took, and its list. */
export function EarlierAnalysis({ analysis, searches }: { analysis: Analysis; searches: boolean }) {
  const { createdAt, createdBy, elapsedMs, seconds, listName, histogram, table, id } = analysis;
  const parts = [
    `Kept ${createdAt.slice(0, 16).replace('T', ' ')} UTC by ${createdBy}`,
    searches && `about ${duration(seconds * 1000)} to spend`,
    elapsedMs !== null && `took ${duration(elapsedMs)}`,
  ];
  return (
    <>
      <p className="text-quiet text-tiny">
        {parts.filter(Boolean).join(', ')}.{' '}
        {listName && (
          <a className="link" href={addressOf(endpoints.getAnalysisList, { params: { id } })} download>
            {listName}
          </a>
        )}
      </p>
      {table && <Compared {...table} />}
      {histogram && <Histogram {...histogram} />}
    </>
  );
}

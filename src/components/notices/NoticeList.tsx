import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Notice as NoticeItem } from '@/api/notices.ts';
import { call } from '@/client/api.ts';
import { useApi } from '@/client/hooks.ts';
import { dateText } from '@/components/runs/RunTitleBlock.tsx';
import { UNREAD_CHANGE } from '@/components/shell/unread.ts';
import { Button } from '@/components/ui/Button.tsx';
import { classes } from '@/components/ui/classes.ts';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';

const FIRST = 50;
const MOST = 500;
const REFRESH_MS = 15_000;

/** What the reader was told, newest first; following one marks it as read. */
export default function NoticeList() {
  const [limit, setLimit] = useState(FIRST);
  const { data, error, mutate } = useApi(
    endpoints.listNotices,
    { query: { limit } },
    { refreshInterval: REFRESH_MS, keepPreviousData: true },
  );
  const [failure, setFailure] = useState<string | null>(null);

  /** Tells the server, then the header and this list. */
  const change = async (work: () => Promise<{ unread: number }>) => {
    setFailure(null);
    try {
      const { unread } = await work();
      document.dispatchEvent(new CustomEvent(UNREAD_CHANGE, { detail: unread }));
      await mutate();
    } catch (problem) {
      setFailure(problem instanceof Error ? problem.message : String(problem));
    }
  };
  const mark = (id: string, read: boolean) =>
    change(() => call(endpoints.patchNotice, { params: { id }, body: { read } }));

  if (!data) {
    if (!error) return <p className="text-quiet">The notices are being fetched.</p>;
    return (
      <Notice
        kind="fail"
        word="The notices could not be fetched"
        live
        action={<Button onClick={() => mutate()}>Try again</Button>}
      >
        {error.message}
      </Notice>
    );
  }
  if (data.notices.length === 0) {
    return (
      <EmptyState title="Nothing to tell yet">
        When a run of yours is finished, fails, reaches its verdict or has results set aside, it is said here.
      </EmptyState>
    );
  }
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <p className="text-quiet">
          {data.unread === 0 ? 'All are read.' : `${counted(data.unread, 'notice')} unread.`}
        </p>
        {data.unread > 0 && (
          <Button size="small" onClick={() => change(() => call(endpoints.readAllNotices, { body: {} }))}>
            Mark all as read
          </Button>
        )}
      </div>
      {failure && (
        <Notice kind="fail" word="Not marked" live>
          {failure}
        </Notice>
      )}
      <ol className="border-ink border-t">
        {data.notices.map((notice) => (
          <NoticeRow key={notice.id} notice={notice} onMark={(read) => mark(notice.id, read)} />
        ))}
      </ol>
      {data.next && limit < MOST && (
        <div>
          <Button kind="quiet" onClick={() => setLimit(MOST)}>
            Older notices
          </Button>
        </div>
      )}
    </div>
  );
}

interface RowProps {
  notice: NoticeItem;
  onMark: (read: boolean) => Promise<void>;
}

function NoticeRow({ notice, onMark }: RowProps) {
  const unread = notice.readAt === null;
  const follow = (event: { metaKey: boolean; ctrlKey: boolean; preventDefault(): void }) => {
    if (!unread) return;
    const elsewhere = event.metaKey || event.ctrlKey;
    if (elsewhere) return void onMark(true);
    event.preventDefault();
    void onMark(true).finally(() => location.assign(notice.path));
  };
  return (
    <li className="grid gap-x-6 gap-y-1 border-rule border-b py-2.5 sm:grid-cols-[minmax(0,1fr)_auto]">
      <div className="min-w-0">
        <p className="flex flex-wrap items-baseline gap-x-3">
          {unread && <span className="bg-act px-1.5 font-semibold text-act-ink text-tiny">unread</span>}
          <a className={classes('link', unread && 'font-semibold')} href={notice.path} onClick={follow}>
            {notice.title}
          </a>
        </p>
        <p className="[overflow-wrap:anywhere]">{notice.text}</p>
        <p className="text-quiet text-tiny">{dateText(notice.createdAt)}</p>
      </div>
      <div data-screen-only>
        <Button
          size="small"
          kind="quiet"
          aria-label={`Mark “${notice.title}” as ${unread ? 'read' : 'unread'}`}
          onClick={() => void onMark(unread)}
        >
          {unread ? 'Mark as read' : 'Mark as unread'}
        </Button>
      </div>
    </li>
  );
}

import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { DeadLetter } from '@/api/notices.ts';
import { call } from '@/client/api.ts';
import { useApi } from '@/client/hooks.ts';
import { dateText } from '@/components/runs/RunTitleBlock.tsx';
import { Button } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

/** Letters given up, with what the mail server said; tried anew or dropped by an administrator. */
export default function DeadLetters() {
  const { data, error, mutate } = useApi(endpoints.listDeadLetters, { query: { limit: 500 } });
  const [failure, setFailure] = useState<string | null>(null);
  const change = async (work: Promise<unknown>) => {
    setFailure(null);
    try {
      await work;
    } catch (problem) {
      setFailure(problem instanceof Error ? problem.message : String(problem));
    }
    await mutate();
  };
  if (error) {
    return (
      <Notice
        kind="fail"
        word="The list could not be fetched"
        live
        action={<Button onClick={() => mutate()}>Try again</Button>}
      >
        {error.message}
      </Notice>
    );
  }
  if (!data) return <p className="text-quiet">The list is being fetched.</p>;
  if (data.letters.length === 0)
    return <p className="text-quiet">None: every letter was delivered or waits for its next try.</p>;
  return (
    <div className="grid gap-3">
      {failure && (
        <Notice kind="fail" word="Not done" live>
          {failure}
        </Notice>
      )}
      <DataTable
        caption="Undeliverable mail, newest first"
        columns={columns(change)}
        rows={data.letters}
        rowKey={(letter) => letter.id}
      />
    </div>
  );
}

const columns = (change: (work: Promise<unknown>) => Promise<void>): Column<DeadLetter>[] => [
  {
    key: 'subject',
    header: 'letter',
    cell: (letter) => (
      <>
        <span className="font-semibold">{letter.subject}</span>
        <span className="block text-quiet text-tiny">to {letter.recipient}</span>
      </>
    ),
  },
  {
    key: 'error',
    header: 'last answer',
    cell: (letter) => <span className="[overflow-wrap:anywhere]">{letter.lastError}</span>,
  },
  {
    key: 'attempts',
    header: 'tries',
    kind: 'number',
    sortBy: (letter) => letter.attempts,
    cell: (letter) => letter.attempts,
  },
  { key: 'ended', header: 'given up', sortBy: (letter) => letter.endedAt, cell: (letter) => dateText(letter.endedAt) },
  {
    key: 'do',
    header: <span className="sr-only">action</span>,
    cell: ({ id, subject }) => (
      <span className="flex flex-wrap gap-1">
        <Button
          size="small"
          aria-label={`Try “${subject}” again`}
          onClick={() => void change(call(endpoints.retryDeadLetter, { params: { id }, body: {} }))}
        >
          Try again
        </Button>
        <Button
          size="small"
          kind="quiet"
          aria-label={`Drop “${subject}”`}
          onClick={() => void change(call(endpoints.discardDeadLetter, { params: { id } }))}
        >
          Drop
        </Button>
      </span>
    ),
  },
];

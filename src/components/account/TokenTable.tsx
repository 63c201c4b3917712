import { useEffect, useState } from 'react';
import type { Token } from '@/api/tokens.ts';
import { dateText } from '@/components/runs/RunTitleBlock.tsx';
import { Button } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { paths } from '@/paths.ts';

interface Props {
  tokens: readonly Token[];
  onRevoke: (token: Token) => void;
}

export function TokenTable({ tokens, onRevoke }: Props) {
  // The clock is read in the browser only, so that server and browser draw the same at first.
  const [now, setNow] = useState<string | null>(null);
  useEffect(() => setNow(new Date().toISOString()), []);
  if (tokens.length === 0) {
    return (
      <EmptyState title="No token yet">
        A token lets a script do what you may, or a part of it, until it expires. The interface is described at{' '}
        <a className="link" href={paths.openApi}>
          {paths.openApi}
        </a>
        .
      </EmptyState>
    );
  }
  return (
    <DataTable
      caption="API tokens, newest first"
      columns={columns(now, onRevoke)}
      rows={tokens}
      rowKey={(token) => token.id}
    />
  );
}

const columns = (now: string | null, onRevoke: (token: Token) => void): Column<Token>[] => [
  {
    key: 'name',
    header: 'name',
    cell: (token) => (
      <>
        <span className="font-semibold">{token.name}</span>
        <span className="block font-mono text-quiet text-tiny">…{token.ending}</span>
      </>
    ),
  },
  { key: 'scopes', header: 'may', cell: (token) => <code className="font-mono">{token.scopes.join(', ')}</code> },
  {
    key: 'used',
    header: 'last use',
    sortBy: (token) => token.lastUsedAt ?? '',
    cell: (token) => (token.lastUsedAt ? dateText(token.lastUsedAt) : 'never'),
  },
  {
    key: 'expires',
    header: 'expires',
    sortBy: (token) => token.expiresAt,
    cell: (token) =>
      now !== null && token.expiresAt <= now ? (
        <span className="font-semibold text-fail">expired {dateText(token.expiresAt)}</span>
      ) : (
        dateText(token.expiresAt)
      ),
  },
  {
    key: 'revoke',
    header: <span className="sr-only">action</span>,
    cell: (token) => (
      <Button size="small" kind="quiet" aria-label={`Revoke ${token.name}`} onClick={() => onRevoke(token)}>
        Revoke
      </Button>
    ),
  },
];

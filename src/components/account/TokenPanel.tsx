import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Token } from '@/api/tokens.ts';
import { call } from '@/client/api.ts';
import { useApi } from '@/client/hooks.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { NewTokenForm } from './NewTokenForm.tsx';
import { RevokeDialog } from './RevokeDialog.tsx';
import { TokenSecret } from './TokenSecret.tsx';
import { TokenTable } from './TokenTable.tsx';

/** The own API tokens: made here, told once, listed without their secret, ended at once. */
export default function TokenPanel({ origin }: { origin: string }) {
  const { data, error, mutate } = useApi(endpoints.listTokens, {});
  const [made, setMade] = useState<{ token: Token; secret: string } | null>(null);
  const [asked, setAsked] = useState<Token | null>(null);

  const revoke = async (token: Token) => {
    await call(endpoints.revokeToken, { params: { id: token.id } });
    setAsked(null);
    if (made?.token.id === token.id) setMade(null);
    await mutate();
  };

  return (
    <div className="grid gap-5">
      {made && <TokenSecret {...made} origin={origin} onClose={() => setMade(null)} />}
      {error ? (
        <Notice
          kind="fail"
          word="The tokens could not be fetched"
          live
          action={<Button onClick={() => mutate()}>Try again</Button>}
        >
          {error.message}
        </Notice>
      ) : (
        data && <TokenTable tokens={data.tokens} onRevoke={setAsked} />
      )}
      <NewTokenForm
        onMade={(answer) => {
          setMade(answer);
          void mutate();
        }}
      />
      <RevokeDialog token={asked} onClose={() => setAsked(null)} onRevoke={revoke} />
    </div>
  );
}

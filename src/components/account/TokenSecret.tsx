import type { Token } from '@/api/tokens.ts';
import { CopyButton } from '@/components/compare/CopyButton.tsx';
import { Button } from '@/components/ui/Button.tsx';

interface Props {
  token: Token;
  secret: string;
  origin: string;
  onClose: () => void;
}

/** The one time that a token is told. */
export function TokenSecret({ token, secret, origin, onClose }: Props) {
  const example = `curl -H 'Authorization: Bearer ${secret}' ${origin}/api/v1/projects`;
  return (
    <section role="status" aria-label="The new token" className="grid gap-3 border border-pass border-l-4 bg-sheet p-4">
      <p>
        <span className="font-semibold text-pass">Made.</span> This is the token “{token.name}”. It is told this once;
        only its digest is kept.
      </p>
      <code className="block border border-rule bg-ground px-3 py-2 font-mono [overflow-wrap:anywhere]">{secret}</code>
      <p className="text-quiet text-tiny">A script sends it with every request:</p>
      <pre className="overflow-x-auto border border-rule bg-ground px-3 py-2 font-mono text-tiny">{example}</pre>
      <div className="flex flex-wrap items-center gap-3" data-screen-only>
        <CopyButton label="Copy token" text={() => secret} />
        <Button size="small" kind="quiet" onClick={onClose}>
          I have kept it
        </Button>
      </div>
    </section>
  );
}

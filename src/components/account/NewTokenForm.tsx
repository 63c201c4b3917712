import { type SubmitEvent, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { longestTokenDays, newTokenSchema, type Scope, type Token } from '@/api/tokens.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { NumberField, TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { typedNumber } from '@/components/ui/typed-number.ts';
import { SCOPE_TEXT } from './scope-text.ts';
import { useSubmission } from './use-submission.ts';

type Made = { token: Token; secret: string };

/** States what a script may do, and for how long. */
export function NewTokenForm({ onMade }: { onMade: (made: Made) => void }) {
  const [name, setName] = useState('');
  const [days, setDays] = useState('90');
  const [scopes, setScopes] = useState<readonly Scope[]>(['read']);
  const { busy, fields, failure, submit } = useSubmission<typeof newTokenSchema, Made>(newTokenSchema);

  const make = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const input = { name, scopes, days: typedNumber(days) };
    const made = await submit(input, (body) => call(endpoints.createToken, { body }));
    if (!made) return;
    setName('');
    onMade(made);
  };

  return (
    <form onSubmit={make} noValidate className="grid gap-4 border-rule border-t pt-4" data-screen-only>
      <h3>New token</h3>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-[minmax(0,1fr)_12rem]">
        <TextField
          label="name"
          hint="what uses it, such as “nightly build”"
          required
          error={fields.name}
          value={name}
          onChange={(event) => setName(event.target.value)}
        />
        <NumberField
          label="days until it expires"
          hint={`1 to ${longestTokenDays}`}
          required
          error={fields.days}
          value={days}
          onChange={(event) => setDays(event.target.value)}
        />
      </div>
      <ScopeBoxes scopes={scopes} onChange={setScopes} error={fields.scopes} />
      {failure && (
        <Notice kind="fail" word="Not made" live>
          {failure}
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy}>
          Make token
        </Button>
      </div>
    </form>
  );
}

interface BoxesProps {
  scopes: readonly Scope[];
  onChange: (scopes: readonly Scope[]) => void;
  error: string | undefined;
}

function ScopeBoxes({ scopes, onChange, error }: BoxesProps) {
  return (
    <fieldset aria-describedby={error ? 'scope-error' : undefined}>
      <legend className="mb-1 text-quiet text-tiny">what it may do, within your own rights</legend>
      <ul className="border-rule border-t">
        {(Object.keys(SCOPE_TEXT) as Scope[]).map((scope) => (
          <li key={scope} className="border-rule border-b">
            <label className="flex min-h-9 cursor-pointer items-baseline gap-3 py-1.5">
              <input
                type="checkbox"
                className="size-4 shrink-0 translate-y-0.5 accent-act"
                checked={scopes.includes(scope)}
                onChange={(event) =>
                  onChange(event.target.checked ? [...scopes, scope] : scopes.filter((one) => one !== scope))
                }
              />
              <span>
                <code className="font-mono">{scope}</code>
                <span className="block text-quiet text-tiny">{SCOPE_TEXT[scope]}</span>
              </span>
            </label>
          </li>
        ))}
      </ul>
      {error && (
        <p id="scope-error" className="mt-1 text-fail text-tiny">
          <span className="font-semibold">Not accepted:</span> {error}
        </p>
      )}
    </fieldset>
  );
}

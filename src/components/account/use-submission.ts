import { useState } from 'react';
import type { z } from 'zod';
import { ApiFailure } from '@/client/api.ts';

export interface Submission<S extends z.ZodType, R> {
  busy: boolean;
  /** Each bad field and what is accepted in it. */
  fields: Readonly<Record<string, string>>;
  /** What went wrong beside the fields. */
  failure: string | null;
  /** The answer of the last submission, when it succeeded. */
  done: R | null;
  submit(input: unknown, send: (body: z.output<S>) => Promise<R>): Promise<R | null>;
  clear(): void;
}

/** A form's way to the server: judged by the endpoint's own schema first, then by the server, told alike. */
export function useSubmission<S extends z.ZodType, R = unknown>(schema: S): Submission<S, R> {
  const [busy, setBusy] = useState(false);
  const [fields, setFields] = useState<Readonly<Record<string, string>>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [done, setDone] = useState<R | null>(null);

  const clear = () => {
    setFields({});
    setFailure(null);
    setDone(null);
  };
  const submit = async (input: unknown, send: (body: z.output<S>) => Promise<R>): Promise<R | null> => {
    clear();
    const parsed = schema.safeParse(input);
    if (!parsed.success) {
      const issues = parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message] as const);
      setFields(Object.fromEntries([...issues].reverse()));
      return null;
    }
    setBusy(true);
    try {
      const answer = await send(parsed.data);
      setDone(answer);
      return answer;
    } catch (error) {
      const named = error instanceof ApiFailure ? error.fields : {};
      setFields(named);
      // A refusal of fields is said beside them.
      if (Object.keys(named).length === 0) setFailure(error instanceof Error ? error.message : String(error));
      return null;
    } finally {
      setBusy(false);
    }
  };
  return { busy, fields, failure, done, submit, clear };
}

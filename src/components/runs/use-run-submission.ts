import { type FormEvent, type RefObject, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { paths } from '@/paths.ts';
import { numberOf } from './number-of.ts';
import type { FieldErrors } from './run-accepted.ts';
import { type Judged, serverErrors } from './run-draft.ts';

/** Sends the run when the form is accepted and goes to its page; otherwise goes to the first field that is not. Errors
 *  are shown from the first try on and vanish as they are mended.
 *  @param targetP At which p the run's page is to be read; null where the run has no such place. */
export function useRunSubmission(
  projectId: string,
  judged: Judged,
  form: RefObject<HTMLFormElement | null>,
  targetP: string | null = null,
) {
  const [wasSent, setWasSent] = useState(false);
  const [refusal, setRefusal] = useState<{ message: string; fields: FieldErrors } | null>(null);
  const [isBusy, setIsBusy] = useState(false);

  const onSubmit = async (event: FormEvent) => {
    event.preventDefault();
    setWasSent(true);
    setRefusal(null);
    const { run } = judged;
    if (!run) return focusFirstError(form.current);
    setIsBusy(true);
    try {
      const answer = await call(endpoints.createRun, { params: { id: projectId }, body: run });
      const at = targetP === null ? '' : `?at=${numberOf(targetP)}`;
      location.assign(paths.run(projectId, answer.run.id) + at);
    } catch (error) {
      setIsBusy(false);
      if (!(error instanceof ApiFailure)) throw error;
      setRefusal({ message: error.message, fields: serverErrors(error.fields, run) });
      focusFirstError(form.current);
    }
  };

  const errors: FieldErrors = { ...refusal?.fields, ...(wasSent ? judged.errors : {}) };
  return { errors, refusal: refusal?.message ?? null, isBusy, onSubmit };
}

function focusFirstError(form: HTMLFormElement | null): void {
  // The fields are marked by the next drawing.
  requestAnimationFrame(() => form?.querySelector<HTMLElement>('[aria-invalid="true"], [data-error]')?.focus());
}

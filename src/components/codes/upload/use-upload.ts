import { useCallback, useEffect, useRef, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { UploadQuery } from '@/api/uploads.ts';
import { ApiFailure } from '@/client/api.ts';
import { sendFile } from '@/client/send-file.ts';
import type { UploadSummary } from '@/core/codes/uploaded-sheet.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';
import { paths } from '@/paths.ts';

export type UploadState =
  | { state: 'empty' }
  | { state: 'reading'; file: File }
  | { state: 'read'; file: File; summary: UploadSummary; failure?: { message: string; fields: Record<string, string> } }
  | { state: 'refused'; file: File; message: string }
  | { state: 'sending'; file: File; summary: UploadSummary; share: number };

/** A chosen file is looked at in a worker of this page first; only what reads well is sent. Choosing another file or
 *  leaving ends what is under way. */
export function useUpload(projectId: string) {
  const [upload, setUpload] = useState<UploadState>({ state: 'empty' });
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);

  const begin = useCallback(() => {
    running.current?.abort();
    running.current = new AbortController();
    return running.current.signal;
  }, []);

  const choose = useCallback(
    async (file: File, format: UploadFormat | undefined) => {
      const signal = begin();
      setUpload({ state: 'reading', file });
      try {
        const { lookAtFile } = await import('@/client/upload-pool.ts');
        const answer = await lookAtFile(file, format, signal);
        if (signal.aborted) return;
        if (answer.ok) setUpload({ state: 'read', file, summary: answer.summary });
        else setUpload({ state: 'refused', file, message: answer.failure.message });
      } catch (error) {
        if (!signal.aborted) setUpload({ state: 'refused', file, message: (error as Error).message });
      }
    },
    [begin],
  );

  const send = useCallback(
    async (file: File, summary: UploadSummary, query: UploadQuery) => {
      const signal = begin();
      setUpload({ state: 'sending', file, summary, share: 0 });
      try {
        const onSent = (sent: number, all: number) =>
          !signal.aborted && setUpload({ state: 'sending', file, summary, share: sent / Math.max(1, all) });
        const input = { params: { id: projectId }, query, signal };
        const { code } = await sendFile(endpoints.uploadCode, input, file, onSent);
        location.assign(paths.code(projectId, code.id));
      } catch (error) {
        if (signal.aborted) return;
        const fields = error instanceof ApiFailure ? { ...error.fields } : {};
        setUpload({ state: 'read', file, summary, failure: { message: (error as Error).message, fields } });
      }
    },
    [projectId, begin],
  );

  const cancel = useCallback(() => {
    running.current?.abort();
    running.current = null;
    setUpload((now) => (now.state === 'sending' ? { ...now, state: 'read' } : { state: 'empty' }));
  }, []);

  return { upload, choose, send, cancel };
}

import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import type { UploadQuery } from '@/api/uploads.ts';
import { ApiFailure } from '@/client/api.ts';
import UploadCode from '@/components/codes/upload/UploadCode.tsx';
import type { UploadSummary } from '@/core/codes/uploaded-sheet.ts';

const look = vi.hoisted(() => vi.fn());
const send = vi.hoisted(() => vi.fn());
vi.mock('@/client/upload-pool.ts', () => ({ lookAtFile: look }));
vi.mock('@/client/send-file.ts', () => ({ sendFile: send }));

beforeEach(() => {
  look.mockReset();
  send.mockReset();
});
afterEach(cleanup);

const matrix = (rows: number, cols: number): UploadSummary => ({
  format: 'mtx',
  kind: 'matrix',
  rows,
  cols,
  ones: 3,
  tellsChecks: rows < cols,
});

async function choose(summary: UploadSummary) {
  look.mockResolvedValue({ ok: true, summary });
  render(<UploadCode projectId="p" />);
  const file = new File(['x'], 'h.mtx');
  fireEvent.change(screen.getByLabelText('Matrix or block list'), { target: { files: [file] } });
  await screen.findByText(/Matrix Market: a matrix/);
  return file;
}
const press = () => fireEvent.click(screen.getByRole('button', { name: 'Upload and analyse' }));
const sentQuery = () => (send.mock.calls[0]![1] as { query: UploadQuery }).query;

test('a matrix with more columns than rows is sent with its rows as checks', async () => {
  send.mockReturnValue(new Promise(() => {}));
  await choose(matrix(2, 5));
  press();
  await waitFor(() => expect(send).toHaveBeenCalled());
  expect(sentQuery()).toMatchObject({ checksAre: 'rows', fileName: 'h.mtx' });
  expect(screen.getByRole('progressbar', { name: 'Uploading' })).toBeTruthy();
});

test('a square matrix is not sent before it is said which way it lies', async () => {
  await choose(matrix(5, 5));
  press();
  expect((await screen.findByRole('alert')).textContent).toContain('does not tell');
  expect(send).not.toHaveBeenCalled();
  fireEvent.click(screen.getByRole('radio', { name: /columns/ }));
  press();
  await waitFor(() => expect(sentQuery().checksAre).toBe('columns'));
});

test('a file that cannot be read says where, and is not sent', async () => {
  look.mockResolvedValue({ ok: false, failure: { code: 'format', message: 'line 5, column 1: an index', data: {} } });
  render(<UploadCode projectId="p" />);
  fireEvent.change(screen.getByLabelText('Matrix or block list'), { target: { files: [new File(['x'], 'h.alist')] } });
  expect((await screen.findByRole('alert')).textContent).toContain('line 5, column 1');
  expect(screen.queryByRole('button', { name: 'Upload and analyse' })).toBeNull();
});

test('cancelling a transfer ends it and keeps what was chosen', async () => {
  let signal: AbortSignal | undefined;
  send.mockImplementation((_, input: { signal: AbortSignal }) => {
    signal = input.signal;
    return new Promise((_resolve, reject) => input.signal.addEventListener('abort', () => reject(input.signal.reason)));
  });
  await choose(matrix(2, 5));
  press();
  fireEvent.click(await screen.findByRole('button', { name: 'Cancel' }));
  expect(signal?.aborted).toBe(true);
  expect(await screen.findByRole('button', { name: 'Upload and analyse' })).toBeTruthy();
});

test('what the server refuses is said, and the file can be sent again', async () => {
  send.mockRejectedValue(new ApiFailure(409, 'duplicate', 'This project already keeps the same matrix.'));
  await choose(matrix(2, 5));
  press();
  expect((await screen.findByRole('alert')).textContent).toContain('already keeps');
  expect(screen.getByRole('button', { name: 'Upload and analyse' })).toBeTruthy();
});

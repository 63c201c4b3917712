import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Code } from '@/api/codes.ts';
import { lineageRows } from '@/components/codes/sheet/lineage-rows.tsx';
import { nextStep } from '@/components/codes/transform/next-step.ts';
import TransformBench from '@/components/codes/transform/TransformBench.tsx';
import {
  formOf,
  transformForms,
  transformFrom,
  transformSearch,
} from '@/components/codes/transform/transform-forms.ts';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { storedSheet } from '@/core/codes/stored-sheet.ts';
import { buildDesign } from '@/core/designs/design.ts';

const plane = buildDesign({ family: 'projective-plane', params: { q: 4 } });
const { H } = deriveLdpc(plane, { checks: 'blocks' });

const build = vi.hoisted(() => vi.fn());
const call = vi.hoisted(() => vi.fn());
vi.mock('@/client/build-pool.ts', () => ({ buildCodeInWorker: build }));
vi.mock('@/client/code-matrix.ts', () => ({ matrixOf: async () => H }));
vi.mock('@/client/api.ts', async (original) => ({ ...(await original<object>()), call }));

const uploaded = {
  id: 'u',
  projectId: 'p',
  name: 'Ours',
  fingerprint: 'ab'.repeat(32),
  design: { family: 'uploaded', params: { fileName: 'h.alist' } },
  designTitle: 'Uploaded matrix, 21 × 21',
  derivation: { kind: 'matrix', checksAre: 'rows' },
} as const;
const shorten = { kind: 'shorten', bits: 2 } as const;
const derived = {
  ...uploaded,
  id: 'd',
  derivation: { kind: 'stored', base: uploaded.fingerprint, transforms: [shorten] },
} as unknown as Code;

beforeEach(() => {
  build.mockReset();
  call.mockReset();
  Element.prototype.scrollIntoView = () => {};
});
afterEach(cleanup);

describe('one more step', () => {
  test('from an upload names it by its fingerprint, and takes the matrix kept on', async () => {
    const plan = nextStep(uploaded, { kind: 'transpose' })!;
    expect(plan.keep).toEqual({
      derivation: { kind: 'stored', base: uploaded.fingerprint, transforms: [{ kind: 'transpose' }] },
    });
    expect(await plan.work()).toMatchObject({ matrix: H, transforms: [{ kind: 'transpose' }] });
  });

  test('from a code that began at an upload keeps the steps before', async () => {
    const plan = nextStep(derived, { kind: 'transpose' })!;
    const transforms = [shorten, { kind: 'transpose' }];
    expect(plan.keep).toEqual({ derivation: { kind: 'stored', base: uploaded.fingerprint, transforms } });
    expect(await plan.work()).toMatchObject({ transforms: [{ kind: 'transpose' }] });
  });

  test('from words there is none', () => {
    const words = {
      ...uploaded,
      design: { family: 'witt', params: {} },
      derivation: { kind: 'constant-weight' },
    } as const;
    expect(nextStep(words, shorten)).toBeNull();
    render(<TransformBench code={words} mayKeep search="" />);
    expect(screen.getByText(/no parity checks/)).toBeTruthy();
  });

  test('from an upload is offered without parallel classes, built in the page and kept on the server', async () => {
    const sheet = storedSheet(
      { matrix: H, designTitle: uploaded.designTitle, transforms: [shorten] },
      { clock: () => 0 },
    );
    build.mockResolvedValue({ ...sheet, fingerprint: await fingerprint(sheet.H) });
    call.mockReturnValue(new Promise(() => {}));
    render(<TransformBench code={uploaded} mayKeep search="?kind=shorten&bits=2" />);
    expect(screen.queryByRole('radio', { name: /parallel classes/i })).toBeNull();
    fireEvent.click(screen.getByRole('button', { name: 'Build and verify' }));
    await screen.findByText(/Keep in this project/, undefined, { timeout: 5000 });
    expect(build.mock.calls[0]![0]).toMatchObject({ transforms: [shorten] });
    expect(screen.getByText('none stated; the matrix stands by itself')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Keep in this project' }));
    await waitFor(() => expect(call).toHaveBeenCalled());
    const { body } = call.mock.calls[0]![1];
    expect(body).toMatchObject({ derivation: { kind: 'stored', base: uploaded.fingerprint, transforms: [shorten] } });
    expect(body.design).toBeUndefined();
  });
});

describe('the lineage of steps from an upload', () => {
  const code = {
    ...derived,
    derivation: { kind: 'stored', base: uploaded.fingerprint, transforms: [shorten, { kind: 'transpose' }] },
    createdAt: '2026-01-01T00:00:00.000Z',
    createdBy: 'A member',
  } as unknown as Code;
  const show = (kept: Parameters<typeof lineageRows>[1]) =>
    render(
      lineageRows(code, kept).map(({ label, value, note }) => (
        <div key={String(label)}>
          {label}: {value} {note}
        </div>
      )),
    );

  test('opens the upload and each step that is kept', () => {
    show([
      { id: 'u', name: 'Ours' },
      { id: 'd', name: 'Shorter' },
    ]);
    const links = screen.getAllByRole('link').map((link) => [link.textContent, link.getAttribute('href')]);
    expect(links).toEqual([
      ['kept as Ours', '/projects/p/codes/u'],
      ['kept as Shorter', '/projects/p/codes/d'],
    ]);
  });

  test('offers to take a step again that is not kept', () => {
    show([{ id: 'u', name: 'Ours' }, null]);
    const again = screen.getByRole('link', { name: 'not kept: take this step again' });
    expect(again.getAttribute('href')).toBe('/projects/p/codes/u/transform?kind=shorten&bits=2');
  });

  test.each(transformForms.map(({ kind }) => kind))('%s fills its form from an address', (kind) => {
    const form = formOf(kind)!;
    const step = transformFrom(form, Object.fromEntries(form.fields.map(({ name, example }) => [name, example])));
    const given = new URLSearchParams(transformSearch(step));
    const typed = Object.fromEntries(form.fields.map(({ name }) => [name, given.get(name) ?? '']));
    expect(given.get('kind')).toBe(kind);
    expect(transformFrom(form, typed)).toEqual(step);
  });
});

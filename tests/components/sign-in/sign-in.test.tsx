import { fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { outcomeFrom, safeNext, signIn } from '@/components/sign-in/auth-post.ts';
import SignInForm from '@/components/sign-in/SignInForm.tsx';

const answering = (url: string) =>
  vi.fn(async (address: string, _init?: RequestInit) =>
    Response.json(address.endsWith('/csrf') ? { csrfToken: 'token' } : { url }),
  );

afterEach(() => vi.unstubAllGlobals());

describe('signing in', () => {
  test('posts the pair with the anti-forgery token and goes where it was sent from', async () => {
    const fetch = answering('http://localhost/projects/7');
    vi.stubGlobal('fetch', fetch);
    expect(await signIn('a@demo.test', 'secret', '/projects/7')).toEqual({ ok: true, next: '/projects/7' });
    const body = fetch.mock.calls[1]![1]!.body as URLSearchParams;
    expect(Object.fromEntries(body)).toEqual({
      email: 'a@demo.test',
      password: 'secret',
      callbackUrl: '/projects/7',
      csrfToken: 'token',
    });
  });

  test('a server that does not answer is said to be unreachable', async () => {
    vi.stubGlobal('fetch', vi.fn().mockRejectedValue(new TypeError('failed')));
    expect(await signIn('a@demo.test', 'x', '/')).toEqual({ ok: false, reason: 'unreachable' });
  });

  test('the wait after too many tries is read from the answer', () => {
    expect(outcomeFrom(new URLSearchParams('error=CredentialsSignin&code=slow-down-20'))).toEqual({
      ok: false,
      reason: 'slow-down',
      waitSeconds: 20,
    });
  });

  test.each([
    ['/projects/7?edit', '/projects/7?edit'],
    ['//elsewhere.test/x', '/'],
    ['https://elsewhere.test/', '/'],
    ['javascript:alert(1)', '/'],
    ['/sign-in', '/'],
    [null, '/'],
  ])('coming from %j one goes on to %s', (wanted, next) => {
    expect(safeNext(wanted, 'http://localhost')).toBe(next);
  });
});

describe('the sign-in form', () => {
  test('says no more of a wrong password than that the pair fits no account', async () => {
    vi.stubGlobal('fetch', answering('http://localhost/sign-in?error=CredentialsSignin&code=credentials'));
    render(<SignInForm next="/" />);
    fireEvent.change(screen.getByLabelText('e-mail'), { target: { value: 'owner@demo.test' } });
    fireEvent.change(screen.getByLabelText('password'), { target: { value: 'wrong' } });
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    await waitFor(() =>
      expect(screen.getByRole('alert').textContent).toBe('Not signed in. E-mail and password do not match an account.'),
    );
  });

  test('fills in a demonstration account by one press', () => {
    const demo = { accounts: [{ email: 'viewer@demo.test', role: 'reads' }], password: 'shore-archive' };
    render(<SignInForm next="/" demo={demo} />);
    fireEvent.click(screen.getAllByRole('button', { name: 'Fill in viewer@demo.test' }).at(-1)!);
    const values = screen.getAllByLabelText<HTMLInputElement>(/e-mail|password/).map((input) => input.value);
    expect(values).toContain('viewer@demo.test');
    expect(values).toContain('shore-archive');
  });
});

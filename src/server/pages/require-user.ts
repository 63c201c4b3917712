import type { AstroGlobal } from 'astro';
import { paths } from '@/paths.ts';
import type { Caller } from '../context.ts';

/** For pages: the signed-in user, or a redirection to the sign-in page that comes back here afterwards.
 *
 *      const user = requireUser(Astro);
 *      if (user instanceof Response) return user;
 */
export function requireUser(astro: AstroGlobal): Caller | Response {
  const { user } = astro.locals;
  if (user) return user;
  const back = `${astro.url.pathname}${astro.url.search}`;
  const query = back === paths.home ? '' : `?${new URLSearchParams({ callbackUrl: back })}`;
  return astro.redirect(`${paths.signIn}${query}`);
}

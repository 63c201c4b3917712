import { Refusal } from '../refusal.ts';

const safeMethods = ['GET', 'HEAD', 'OPTIONS'];

/** Refuses changes that another site's page makes a browser send with our cookie. A browser states the Origin of every
 *  such request; a script that states none may send JSON (which a foreign page cannot without asking first), or carry
 *  no cookie at all.
 *  @throws Refusal */
export function checkOrigin(request: Request, own: string): void {
  if (safeMethods.includes(request.method)) return;
  const origin = request.headers.get('origin');
  if (origin === own) return;
  if (origin === null) {
    const json = request.headers.get('content-type')?.toLowerCase().startsWith('application/json') ?? false;
    if (json || !request.headers.has('cookie')) return;
  }
  throw new Refusal('origin', `A change must come from this site: its Origin must be ${own}.`);
}

/** Where this site is reached from outside: PUBLIC_URL, or in local mode the address that src/server/main.mjs listens
 *  on (it sets LOCAL_URL). */
export const siteOrigin = (env: NodeJS.ProcessEnv = process.env): string =>
  new URL(env.PUBLIC_URL ?? env.LOCAL_URL ?? 'http://127.0.0.1:4321').origin;

/** A path of this site as a link for a letter. */
export const linkTo = (path: string): string => new URL(path, siteOrigin()).href;

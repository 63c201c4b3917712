/** Where a request comes from, as src/server/main.mjs pinned it. */
export const clientAddressOf = (request: Request): string => request.headers.get('x-client-address') ?? 'unknown';

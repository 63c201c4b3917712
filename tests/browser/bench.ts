import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

/** Debian's Chromium, without the services that would look for the network. */
export const launch = (): Promise<Browser> =>
  chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });

/** What a page complained of: errors and warnings of the console, exceptions, requests that failed. */
export function complaintsOf(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning')
      complaints.push(`${message.type()}: ${message.text()}`);
  });
  page.on('pageerror', (error) => complaints.push(`exception: ${error.message}`));
  return complaints;
}

/** Islands of this page have taken over from their server-made markup. */
export const hydrated = (page: Page) =>
  page.waitForFunction(
    () =>
      document.querySelector('astro-island') !== null && !document.querySelector('astro-island[ssr][client="load"]'),
  );

export async function signIn(page: Page, base: string, account: string): Promise<void> {
  await page.goto(`${base}/sign-in`);
  await hydrated(page);
  await page.getByLabel('e-mail').fill(`${account}@demo.test`);
  await page.getByLabel('password', { exact: true }).fill('shore-archive');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL(`${base}/`);
}

export async function openProject(page: Page, base: string, name: string): Promise<string> {
  await page.goto(base);
  await page.getByRole('link', { name }).click();
  await page.waitForURL(/\/projects\//);
  return new URL(page.url()).pathname.split('/')[2]!;
}

/** Bytes of script that a page took over the wire, compressed as they were sent. */
export async function scriptBytes(context: BrowserContext, address: string): Promise<number> {
  const page = await context.newPage();
  const session = await context.newCDPSession(page);
  await session.send('Network.enable');
  await session.send('Network.setCacheDisabled', { cacheDisabled: true });
  const scripts = new Set<string>();
  let bytes = 0;
  session.on('Network.responseReceived', ({ requestId, response }) => {
    if (/javascript/.test(response.mimeType)) scripts.add(requestId);
  });
  session.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    if (scripts.has(requestId)) bytes += encodedDataLength;
  });
  await page.goto(address, { waitUntil: 'networkidle' });
  await page.close();
  return bytes;
}

import { existsSync } from 'node:fs';
import { type Browser, chromium, type Page } from 'playwright-core';

const PATH = process.env.BEDORDER_CHROMIUM ?? '/usr/bin/chromium';

/** Whether a browser is there; says so loudly where it is not, and fails where one is required. */
export const browserThere: boolean = (() => {
  if (existsSync(PATH)) return true;
  if (process.env.BEDORDER_BROWSER_REQUIRED === '1') throw new Error(`A browser is required, and none is at ${PATH}.`);
  console.warn(`\n!!! NO BROWSER AT ${PATH}: the browser tests are SKIPPED. Install Debian's chromium to run them.\n`);
  return false;
})();

/** Starts the system's browser with everything off that would reach out. */
export const startBrowser = (): Promise<Browser> =>
  chromium.launch({
    executablePath: PATH,
    args: [
      '--headless',
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });

/** A page with what it said and what it asked for. */
export interface Watched {
  readonly page: Page;
  readonly messages: string[];
  readonly requests: string[];
}

/** Opens a file of the results folder and keeps watch over console, errors, dialogs and requests. */
export async function open(
  browser: Browser,
  path: string,
  options: { readonly width?: number; readonly dark?: boolean; readonly script?: boolean } = {},
): Promise<Watched> {
  const page = await browser.newPage({
    viewport: { width: options.width ?? 1400, height: 900 },
    colorScheme: options.dark ? 'dark' : 'light',
    javaScriptEnabled: options.script ?? true,
  });
  const messages: string[] = [];
  const requests: string[] = [];
  page.on('console', (message) => messages.push(message.text()));
  page.on('pageerror', (error) => messages.push(String(error)));
  page.on('dialog', (dialog) => {
    messages.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on('request', (request) => {
    if (!request.url().startsWith('data:') && request.url() !== `file://${path}`) requests.push(request.url());
  });
  await page.goto(`file://${path}`);
  return { page, messages, requests };
}

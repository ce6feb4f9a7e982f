/** A real Chromium (Debian's) against the running application: signing in as a role of the demo, and what to look at. */
import { readFileSync } from 'node:fs';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

export const BASE = process.env.TEST_BASE_URL ?? 'http://127.0.0.1:4600';
export const FAKES = process.env.TEST_FAKES_URL ?? 'http://127.0.0.1:4601';

/** No flag here reaches out of the machine; the sandbox needs rights that root in a container lacks. */
const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const DESK = { width: 1440, height: 900 } as const;
export const PHONE = { width: 390, height: 844 } as const;

export async function openBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: '/usr/bin/chromium', headless: true, args: FLAGS });
}

/** `builder`, `storekeeper`, `buyer`, `lead` of the first workshop; any e-mail otherwise. */
export function signInOf(who: string): { email: string; password: string } {
  const lines = readFileSync(process.env.SIGN_INS_FILE ?? '.data/sign-ins.txt', 'utf8')
    .trim()
    .split('\n');
  for (const line of lines) {
    const [roles, email = '', password = ''] = line.split(/\s+/);
    if (email === who || (roles === who && email.endsWith('@fernhollow.example'))) return { email, password };
  }
  throw new Error(`nobody signs in as ${who}`);
}

export interface Signed {
  readonly context: BrowserContext;
  readonly page: Page;
  /** What went wrong in the page's own code; a journey ends with none. */
  readonly errors: string[];
}

export async function signedIn(
  browser: Browser,
  who: string,
  viewport: { width: number; height: number } = DESK,
): Promise<Signed> {
  const context = await browser.newContext({
    viewport,
    reducedMotion: 'reduce',
    acceptDownloads: true,
    hasTouch: viewport.width < 500,
  });
  context.setDefaultTimeout(30_000);
  const page = await context.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(String(error)));
  page.on('console', (message) => {
    // A refusal is an answer that the page shows; the browser logs its status all the same.
    if (message.type() === 'error' && !message.text().includes('Failed to load resource')) errors.push(message.text());
  });
  const { email, password } = signInOf(who);
  await page.goto(`${BASE}/sign-in`);
  await page.getByLabel('E-mail').first().fill(email);
  await page.getByLabel('Password').first().fill(password);
  await page.keyboard.press('Enter');
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
  return { context, page, errors };
}

/** How far the page is wider than the window; a phone's page must not scroll sideways. */
export const overflow = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

export async function fake<T>(path: string, body?: unknown): Promise<T> {
  const response = await fetch(
    `${FAKES}${path}`,
    body === undefined
      ? {}
      : { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) },
  );
  return (await response.json()) as T;
}

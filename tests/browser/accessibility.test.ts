/** Every screen against WCAG 2.2 A and AA with axe-core, at a desk and on a phone, on paper and under the lamp. */
import AxeBuilder from '@axe-core/playwright';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { BASE, DESK, openBrowser, overflow, PHONE, type Signed, signedIn } from './browsing';

let browser: Browser;
let desk: Signed;
let phone: Signed;

/** Addresses, and on each where needed the first link of a table that leads on. */
const SCREENS: readonly (readonly [name: string, address: string, open?: string])[] = [
  ['Today', '/'],
  ['circuits', '/circuits'],
  ['a circuit', '/circuits', 'Circuits'],
  ['batches', '/batches'],
  ['a batch', '/batches', 'Batches'],
  ['parts', '/parts?search=100n'],
  ['a part', '/parts?search=TL072', 'Parts'],
  ['bins', '/bins'],
  ['receive', '/receive'],
  ['counts', '/counts'],
  ['ledger', '/ledger'],
  ['shortfalls', '/shortfalls'],
  ['orders', '/orders'],
  ['an order', '/orders?state=part-received', 'Orders'],
  ['suppliers', '/suppliers'],
  ['a supplier', '/suppliers', 'Suppliers'],
  ['people', '/people'],
  ['settings', '/settings'],
  ['tokens', '/tokens'],
];

beforeAll(async () => {
  browser = await openBrowser();
  desk = await signedIn(browser, 'lead', DESK);
  phone = await signedIn(browser, 'lead', PHONE);
  await phone.page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' });
});

afterAll(async () => {
  await browser?.close();
});

async function offences(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  return violations.map(
    (one) =>
      `${one.id}: ${one.nodes
        .slice(0, 3)
        .map((node) => node.target.join(' '))
        .join(' | ')}`,
  );
}

async function go(page: Page, address: string, open: string | undefined): Promise<void> {
  await page.goto(`${BASE}${address}`);
  await page.getByRole('heading', { level: 1 }).waitFor();
  if (open === undefined) return;
  const before = page.url();
  await page.getByRole('table', { name: open }).getByRole('link').first().click();
  await page.waitForURL((url) => url.href !== before);
  await page.getByRole('heading', { level: 1 }).waitFor();
}

describe('accessibility', () => {
  for (const [name, address, open] of SCREENS) {
    it(`${name}: no offence at a desk on paper, none on a phone under the lamp, nothing wider than the phone`, async () => {
      await go(desk.page, address, open);
      expect(await offences(desk.page), 'at a desk').toEqual([]);
      await go(phone.page, address, open);
      expect(await offences(phone.page), 'on a phone').toEqual([]);
      expect(await overflow(phone.page)).toBeLessThanOrEqual(0);
    });
  }

  it('the lines of a revision with the stand-in sheet, and the import page', async () => {
    for (const { page } of [desk, phone]) {
      await go(page, '/circuits', 'Circuits');
      await page
        .getByRole('table', { name: /^Revisions of/ })
        .getByRole('link')
        .first()
        .click();
      await page.waitForURL(/\/revisions\//);
      await page.getByRole('grid').waitFor();
      expect(await offences(page)).toEqual([]);
      await page.getByRole('gridcell').first().click();
      await page.waitForURL(/line=/);
      await page.getByText('the maker’s datasheet decides').waitFor();
      expect(await offences(page)).toEqual([]);
      await page.goto(page.url().replace(/\?.*/, '/import'));
      await page.getByRole('heading', { level: 1 }).waitFor();
      expect(await offences(page)).toEqual([]);
      expect(await overflow(page)).toBeLessThanOrEqual(0);
    }
  });

  it('the pages before signing in', async () => {
    const context = await browser.newContext({ viewport: PHONE });
    const page = await context.newPage();
    for (const address of ['/sign-in', '/password-reset']) {
      await page.goto(`${BASE}${address}`);
      await page.getByRole('heading', { level: 1 }).waitFor();
      expect(await offences(page), address).toEqual([]);
      expect(await overflow(page)).toBeLessThanOrEqual(0);
    }
    await context.close();
  });
});

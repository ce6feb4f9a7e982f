/** Counting on a phone, a lead's approval, a withdrawn delivery, and two workshops that can't see each other. */
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { BASE, fake, openBrowser, overflow, PHONE, signedIn } from './browsing';

let browser: Browser;

beforeAll(async () => {
  browser = await openBrowser();
});

afterAll(async () => {
  await browser?.close();
});

describe('a storekeeper with a phone', () => {
  it('counts two bins blind, sees the variance only then, gives a reason, posts, and finds it in the ledger', async () => {
    const { page, errors } = await signedIn(browser, 'storekeeper', PHONE);
    await page.goto(`${BASE}/counts`);
    for (const box of await page.getByRole('checkbox').all()) await box.uncheck();
    for (const code of ['A-02-1', 'A-03-1']) {
      await page.getByLabel('Another bin').fill(code);
      await page
        .getByRole('list', { name: 'Another bin: found' })
        .getByRole('button', { name: new RegExp(code) })
        .click();
      await page.getByRole('checkbox', { name: new RegExp(code) }).waitFor();
    }
    await page.getByRole('button', { name: 'Count 2 bins' }).click();
    await page.waitForURL(/\/counts\/[0-9a-f-]{36}$/);
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    const address = page.url();
    for (let step = 0; step < 12; step += 1) {
      await page.goto(address);
      if (await page.getByText(/differ from the ledger|agree with the ledger/).isVisible()) break;
      expect(await page.getByText('Ledger', { exact: true }).count()).toBe(0);
      const nothing = page.getByRole('button', { name: 'Nothing else lies there' });
      if (await nothing.isVisible()) {
        await Promise.all([page.waitForResponse((response) => response.url().endsWith('/entries')), nothing.click()]);
        continue;
      }
      const pad = page.getByRole('group', { name: /^Units of/ });
      await pad.getByRole('button', { name: '7', exact: true }).click();
      await pad.getByRole('button', { name: 'OK' }).click();
      await page.getByText(/noted|Everything is counted/).waitFor();
    }
    await page.getByText(/differ from the ledger/).waitFor();
    await page
      .getByLabel(/^Why .* in A-02-1 differs/)
      .first()
      .selectOption('miscounted before');
    await page.getByRole('button', { name: /^Post \d correction/ }).click();
    await page.getByText(/^Posted: \d+ units corrected/).waitFor();
    await page.goto(`${BASE}/ledger?kind=count`);
    await page.getByText('miscounted before').first().waitFor();
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    expect(errors).toEqual([]);
  });

  it('finds a bin by what is typed into the one field', async () => {
    const { page } = await signedIn(browser, 'storekeeper', PHONE);
    await page.getByRole('combobox').or(page.getByPlaceholder('Type or scan anything')).first().fill('B-04-4');
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/bins\?|\/find/);
    await page.getByText('B-04-4').first().waitFor();
  });
});

describe('a lead', () => {
  it('approves an order above the limit that a buyer submitted; a buyer is not offered that', async () => {
    const buyer = await signedIn(browser, 'buyer');
    await buyer.page.goto(`${BASE}/orders?state=submitted`);
    await buyer.page.getByRole('table', { name: 'Orders' }).getByRole('link').first().click();
    await buyer.page.getByText('Waits for a lead').waitFor();
    expect(await buyer.page.getByRole('button', { name: 'Approve' }).count()).toBe(0);
    const { page } = await signedIn(browser, 'lead');
    await page.goto(buyer.page.url());
    await page.getByRole('button', { name: 'Approve' }).click();
    await page.getByText('approved').first().waitFor();
  });

  it('invites somebody; the mail’s link leads to a name and a password, and the new person is in with that role', async () => {
    const { page } = await signedIn(browser, 'lead');
    const email = `new.${Date.now().toString(36)}@fernhollow.example`;
    await page.goto(`${BASE}/people`);
    await page.getByLabel('Their e-mail').fill(email);
    await page.getByRole('button', { name: 'Send the invitation' }).click();
    await page.getByRole('table', { name: 'Open invitations' }).getByText(email, { exact: true }).waitFor();
    const mails = await fake<{ text: string }[]>(`/mail.json?to=${encodeURIComponent(email)}&count=1&waitMs=20000`);
    const link = /http:\S+\/invitation\S+/.exec(mails[0]?.text ?? '')?.[0] ?? '';
    const context = await browser.newContext();
    const guest = await context.newPage();
    await guest.goto(link);
    await guest.getByLabel('Your name').fill('N. Thistle');
    await guest
      .getByLabel(/password/i)
      .first()
      .fill('a long enough pass phrase');
    await guest.getByRole('button', { name: /join|come in|accept/i }).click();
    await guest.waitForURL((url) => url.pathname === '/');
    await guest.getByText('N. Thistle').first().waitFor();
    await guest.goto(`${BASE}/shortfalls`);
    expect(await guest.getByRole('button', { name: /^Raise/ }).count()).toBe(0);
    await context.close();
  });
});

describe('two workshops', () => {
  it('see nothing of each other: another workshop’s addresses lead nowhere', async () => {
    const ours = await signedIn(browser, 'builder');
    await ours.page.goto(`${BASE}/batches`);
    const address = await ours.page
      .getByRole('table', { name: 'Batches' })
      .getByRole('link')
      .first()
      .getAttribute('href');
    const { page } = await signedIn(browser, 'lead@larkspur.example');
    await page.goto(`${BASE}${address}`);
    await page.getByText('Nothing lies here').waitFor();
    await page.goto(`${BASE}/circuits`);
    await page.getByText('No circuit yet').waitFor();
  });
});

describe('an address that names nothing', () => {
  it.each([
    '/batches/abc',
    '/revisions/abc',
    '/parts?page=99999999999',
    '/ledger?from=2026-99-99',
    '/find?q=%00',
    '/bins?bin=x',
  ])('%s says so, and is no failure of ours', async (address) => {
    const { page, context } = await signedIn(browser, 'lead');
    const answer = await page.goto(`${BASE}${address}`);
    expect(answer?.status()).toBeLessThan(500);
    await page.getByRole('heading', { level: 1 }).waitFor();
    await context.close();
  });
});

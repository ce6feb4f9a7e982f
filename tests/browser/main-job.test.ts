/**
 * The whole job in a real browser, each step by whose job it is: a spreadsheet becomes a frozen revision, a batch is
 * reserved, what is short is bought by card, received on a phone, picked on a phone, and the kit is finished.
 */
import { writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import ExcelJS from 'exceljs';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { BASE, DESK, fake, openBrowser, overflow, PHONE, type Signed, signedIn } from './browsing';

let browser: Browser;
const people = new Map<string, Signed>();
const seen: {
  circuit: string;
  revision: string;
  batch: string;
  batchNumber: string;
  order: string;
  orderNumber: string;
} = {
  circuit: '',
  revision: '',
  batch: '',
  batchNumber: '',
  order: '',
  orderNumber: '',
};
const NAME = `Ring Mixer ${Date.now().toString(36)}`;

/** A parts list as a person would send it: title, heading, a dual pot, a doubt about a taper, a part that is short. */
async function spreadsheet(): Promise<string> {
  const book = new ExcelJS.Workbook();
  const sheet = book.addWorksheet('Main');
  sheet.addRows([
    ['Ring mixer, main board'],
    [],
    ['Designators', 'Qty', 'Value', 'Notes'],
    ['R1-R4', 4, '100k', '1%'],
    ['C1, C2', 2, '100n', 'X7R'],
    ['D1-D4', 4, '1N4148', ''],
    ['U1', 1, 'TL072CP', ''],
    ['U2, U3, U4', 3, 'AS3340', ''],
    ['RV1', 1, 'A100k', ''],
    ['Total', 15],
  ]);
  const file = path.join(tmpdir(), `ohmstead-journey-${process.pid}.xlsx`);
  writeFileSync(file, new Uint8Array(await book.xlsx.writeBuffer()));
  return file;
}

async function as(who: string, viewport = DESK as { width: number; height: number }): Promise<Signed> {
  const key = `${who} ${viewport.width}`;
  const known = people.get(key);
  if (known) return known;
  const signed = await signedIn(browser, who, viewport);
  people.set(key, signed);
  return signed;
}

beforeAll(async () => {
  browser = await openBrowser();
});

afterAll(async () => {
  await browser?.close();
});

describe('from a spreadsheet to a finished kit', () => {
  it('the builder makes a circuit, sends the spreadsheet through the upload store and sees every row understood', async () => {
    const { page } = await as('builder');
    await page.goto(`${BASE}/circuits`);
    await page.getByRole('button', { name: 'New circuit' }).first().click();
    await page.getByLabel('Name').fill(NAME);
    await page.getByRole('button', { name: 'Make the circuit' }).click();
    await page.waitForURL(/\/circuits\/[0-9a-f-]{36}$/);
    seen.circuit = page.url();
    await page.getByLabel('Parts list file').setInputFiles(await spreadsheet());
    await page.getByRole('button', { name: 'Read the list' }).click();
    await page.waitForURL(/\/revisions\/[0-9a-f-]{36}\/import$/);
    seen.revision = page.url().replace('/import', '');
    await page.getByText('Taper A').waitFor();
    expect(await page.getByText('total, no part').count()).toBe(1);
    const files = await fake<{ files?: unknown[] } | unknown[]>('/__/uploads');
    expect(JSON.stringify(files)).toContain('ohmstead-journey');
  });

  it('the builder can’t freeze it before the question is answered, answers, and freezes', async () => {
    const { page } = await as('builder');
    await page.getByRole('button', { name: 'Freeze this revision' }).click();
    await page.getByRole('alert').filter({ hasText: 'question' }).waitFor();
    await page.getByRole('button', { name: 'logarithmic' }).click();
    await page.getByText('No question is open').waitFor();
    await page.getByRole('button', { name: 'Freeze this revision' }).click();
    await page.waitForURL(/\/revisions\/[0-9a-f-]{36}$/);
    await page.getByText('frozen').first().waitFor();
  });

  it('the builder opens the stand-in sheet from the grid by the keyboard and reads the checks', async () => {
    const { page } = await as('builder');
    await page.getByRole('gridcell', { name: 'TL072CP' }).first().click();
    await page.waitForURL(/line=/);
    await page.getByRole('heading', { name: /U1/ }).waitFor();
    await page.getByLabel('Try another part').fill('LM358');
    await page.getByRole('list', { name: 'Parts found' }).getByRole('link').first().click();
    await page.waitForURL(/part=/);
    await page.getByRole('table', { name: 'Checks' }).waitFor();
    expect(await page.getByRole('table', { name: 'Checks' }).getByRole('row').count()).toBeGreaterThan(4);
  });

  it('the builder plans two units and reserves what there is; three oscillator chips a unit are short', async () => {
    const { page } = await as('builder');
    await page.goto(seen.revision);
    await page.getByRole('button', { name: 'Plan a batch' }).click();
    await page.getByLabel('How many units').fill('2');
    await page.getByRole('dialog').getByRole('button', { name: 'Plan a batch' }).click();
    await page.waitForURL(/\/batches\/[0-9a-f-]{36}$/);
    seen.batch = page.url();
    seen.batchNumber = (await page.getByRole('heading', { level: 1 }).innerText()).split(' ')[0] ?? '';
    await page.getByRole('button', { name: 'Reserve what there is' }).click();
    await page.getByText(/Still short: \d+ × AS3340/).waitFor();
  });

  it('the buyer turns that shortfall into a draft, submits it, has a card declined, then pays', async () => {
    const { page } = await as('buyer');
    await page.goto(`${BASE}/shortfalls`);
    const rows = page.getByRole('table', { name: 'Shortfalls' }).getByRole('row');
    await rows.first().waitFor();
    const offers = await page.getByRole('button', { name: /^Leave it out/ }).allInnerTexts();
    for (const words of offers.filter((one) => !one.includes('AS3340'))) {
      await page.getByRole('button', { name: words.replace(/\s+/g, ' ').trim(), exact: true }).click();
    }
    expect(await rows.filter({ hasText: seen.batchNumber }).filter({ hasText: 'AS3340' }).count()).toBe(1);
    await page.getByRole('button', { name: /Raise 1 draft order/ }).click();
    await page.waitForURL(/\/orders\/[0-9a-f-]{36}$/);
    seen.order = page.url();
    seen.orderNumber = (await page.getByRole('heading', { level: 1 }).innerText()).split(' ')[1] ?? '';
    await page.getByRole('button', { name: /^Submit €/ }).click();
    await page.getByRole('button', { name: /by card$/ }).click();
    await page.waitForURL(/\/checkout\//);
    await payWith(page, '4000 0000 0000 0002');
    await page
      .getByText(/declined/i)
      .first()
      .waitFor();
    await payWith(page, '4242 4242 4242 4242');
    await page.waitForURL((url) => url.origin === BASE);
    await page.getByText('paid').first().waitFor();
    await page.getByRole('button', { name: /^Send to/ }).waitFor();
  });

  it('the buyer sends it; the supplier’s mail arrives with the order as PDF and CSV', async () => {
    const { page } = await as('buyer');
    await page.getByRole('button', { name: /^Send to/ }).click();
    await page.getByText('sent').first().waitFor();
    const mails = await fake<unknown[]>(
      `/mail.json?subject=${encodeURIComponent(`Order ${seen.orderNumber} from`)}&count=1&waitMs=20000`,
    );
    const text = JSON.stringify(mails);
    expect(text).toContain(`${seen.orderNumber}.pdf`);
    expect(text).toContain(`${seen.orderNumber}.csv`);
  });

  it('the storekeeper receives it on a phone in two deliveries, and the waiting batch is told', async () => {
    const { page } = await as('storekeeper', PHONE);
    const address = `${BASE}/receive/${seen.order.split('/').at(-1)}`;
    await page.goto(address);
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    const ordered = Number(await page.getByLabel('How many').inputValue());
    await page.getByLabel('How many').fill('2');
    await page.getByText(`${ordered - 2} stay to come.`).waitFor();
    await page.getByRole('button', { name: 'Put the bags in' }).click();
    await page.getByRole('link', { name: new RegExp(`${seen.batchNumber}.*can reserve`) }).waitFor();
    await page.goto(address);
    await page.getByLabel('Lot code').fill('K-77');
    await page.getByRole('button', { name: 'Put the bags in' }).click();
    await page.getByText(`Order ${seen.orderNumber} is complete.`).waitFor();
  });

  it('the builder reserves the rest and the storekeeper picks every stop on the phone, one of them not all there', async () => {
    const builder = await as('builder');
    await builder.page.goto(seen.batch);
    await builder.page.getByRole('button', { name: 'Reserve whole lines' }).click();
    await builder.page.getByText('Every line is covered; the kit can be picked.').waitFor();

    const { page } = await as('storekeeper', PHONE);
    await page.goto(`${seen.batch}/pick`);
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    await page.getByRole('button', { name: 'Not there' }).click();
    await page.getByRole('group', { name: 'Found in the bin' }).getByRole('button', { name: '1', exact: true }).click();
    await page.getByRole('group', { name: 'Found in the bin' }).getByRole('button', { name: 'OK' }).click();
    await page.getByText(/is flagged for a count/).waitFor();
    for (let stop = 0; stop < 30; stop += 1) {
      await page.goto(`${seen.batch}/pick`);
      const took = page.getByRole('button', { name: /^Took \d+$/ });
      if (!(await took.isVisible().catch(() => false)) && (await page.getByText('Everything is picked').isVisible()))
        break;
      await took.click();
      await page.getByText(/^(Took \d+ ×|The kit is picked)/).waitFor();
    }
    await page.getByText('Everything is picked').waitFor();
  });

  it('the builder finishes the batch with a leftover, which is back on the shelf in the ledger', async () => {
    const { page } = await as('builder');
    await page.goto(seen.batch);
    const kit = page.getByRole('button', { name: 'Call the kit complete without them' });
    if (await kit.isVisible()) {
      await kit.click();
      await page.getByLabel('Why it may be built like that').fill('the bench has spares of it');
      await page.getByRole('dialog').getByRole('button', { name: 'Call the kit complete without them' }).click();
      await page.getByText('kit complete').first().waitFor();
    }
    await page.getByText('Something is left over').click();
    await page.getByLabel(/^Left over of TL072CP/).fill('1');
    await page.getByRole('button', { name: 'Finish the batch' }).click();
    await page.getByText('finished').first().waitFor();
    await page.getByRole('link', { name: 'ledger' }).click();
    await page.getByRole('cell', { name: 'returned' }).first().waitFor();
  });

  it('nobody’s page failed on the way', () => {
    expect([...people.values()].flatMap((one) => one.errors)).toEqual([]);
  });
});

async function payWith(page: Signed['page'], card: string): Promise<void> {
  await page.getByLabel(/card number/i).fill(card);
  await page.getByRole('button', { name: /^pay/i }).click();
}

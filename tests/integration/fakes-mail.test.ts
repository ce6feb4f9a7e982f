/** Mail handed to the stand-in by the real client library, and read back from the mailbox. */
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { type Mail, messageIdFor, sendMail } from '@/lib/services/mail';
import { type Fakes, freePort, startFakes } from './fakes-running';

type Received = {
  id: string;
  to: string[];
  from: string;
  subject: string;
  text: string;
  html: string | null;
  messageId: string;
  repeatOf: string | null;
  links: string[];
  attachments: { filename: string; contentType: string; size: number; sha256: string; href: string }[];
};

let fakes: Fakes;

beforeAll(async () => {
  fakes = await startFakes(await freePort());
});
afterAll(() => fakes.stop());
beforeEach(async () => {
  await fakes.control('reset');
});

const order: Mail = {
  to: 'orders@brasskettle.example',
  subject: 'Order 2031 from Fernhollow Synth Works',
  text: 'The order is attached.\nhttp://localhost:3000/orders/2031',
  html: '<p>The order is <a href="http://localhost:3000/orders/2031?from=mail&amp;x=1">attached</a>.</p><script>alert(1)</script>',
  attachments: [
    {
      filename: 'order-2031.csv',
      contentType: 'text/csv',
      content: new TextEncoder().encode('part,quantity\nTL072,40\n'),
    },
    {
      filename: 'order-2031 ±.pdf',
      contentType: 'application/pdf',
      content: new Uint8Array(70_000).map((_, at) => (at * 7) % 256),
    },
  ],
  messageIdFrom: 'order-sent:2031:1',
};

async function received(query = 'count=1'): Promise<Received[]> {
  return (await fakes.read(`/mail.json?waitMs=10000&${query}`)) as Received[];
}

describe('an order sent to a supplier', () => {
  it('arrives with its documents unchanged', async () => {
    expect(await sendMail(order)).toMatchObject({ ok: true });
    const [mail] = await received(`to=${encodeURIComponent('orders@brasskettle.example')}`);
    expect(mail).toMatchObject({
      to: ['orders@brasskettle.example'],
      subject: order.subject,
      from: expect.stringContaining('stores@ohmstead.example'),
    });
    expect(mail?.text).toContain('The order is attached.');
    expect(mail?.links).toEqual([
      'http://localhost:3000/orders/2031',
      'http://localhost:3000/orders/2031?from=mail&x=1',
    ]);
    expect(mail?.attachments.map(({ filename, contentType, sha256 }) => ({ filename, contentType, sha256 }))).toEqual(
      (order.attachments ?? []).map(({ filename, contentType, content }) => ({
        filename,
        contentType,
        sha256: createHash('sha256').update(content).digest('hex'),
      })),
    );
    const pdf = await fetch(`${fakes.origin}${mail?.attachments[1]?.href ?? ''}`);
    expect(pdf.headers.get('content-disposition')).toMatch(/^attachment/);
    expect(Buffer.from(await pdf.arrayBuffer()).equals(Buffer.from(order.attachments?.[1]?.content ?? []))).toBe(true);
  });

  it('is recognisable when it is sent again, and different from the next one', async () => {
    const first = await sendMail(order);
    const second = await sendMail(order);
    const other = await sendMail({ ...order, messageIdFrom: 'order-sent:2031:2' });
    if (!first.ok || !second.ok || !other.ok) throw new Error('not sent');
    expect(second.messageId).toBe(first.messageId);
    expect(other.messageId).not.toBe(first.messageId);
    const [third, repeat, original] = await received('count=3');
    expect([original?.repeatOf, repeat?.repeatOf, third?.repeatOf]).toEqual([null, original?.id, null]);
  });

  it('may have arrived although no answer came; sending it again shows as a repeat', async () => {
    await fakes.control('next', { service: 'mail', drop: 'after' });
    expect(await sendMail(order)).toMatchObject({ ok: false, reason: 'unreachable' });
    expect(await sendMail(order)).toMatchObject({ ok: true });
    const [repeat, original] = await received('count=2');
    expect(repeat?.repeatOf).toBe(original?.id);
  });

  it('has not arrived where the connection broke before', async () => {
    await fakes.control('next', { service: 'mail', drop: 'before' });
    expect(await sendMail(order)).toMatchObject({ ok: false, reason: 'unreachable' });
    expect(await fakes.read('/mail.json')).toEqual([]);
  });

  it('tells "try later" from "never"', async () => {
    await fakes.control('next', { service: 'mail', status: 429 });
    expect(await sendMail(order)).toMatchObject({ ok: false, reason: 'later' });
    await fakes.control('next', { service: 'mail', status: 500 });
    expect(await sendMail(order)).toMatchObject({ ok: false, reason: 'refused' });
    expect(await sendMail({ ...order, to: 'nobody' })).toMatchObject({ ok: false });
    expect(await fakes.read('/mail.json')).toEqual([]);
  });
});

describe('what people type', () => {
  it('adds no header and no recipient', async () => {
    await sendMail({ ...order, subject: 'Order\r\nBcc: stranger@elsewhere.example\r\n\r\nbody' });
    const [mail] = await received();
    expect(mail?.to).toEqual(['orders@brasskettle.example']);
    const source = await (await fetch(`${fakes.origin}/mail/${mail?.id ?? ''}/source.eml`)).text();
    expect(source).not.toMatch(/^bcc:/im);
  });

  it('runs nothing on the page that shows it', async () => {
    await sendMail({ ...order, subject: '<img src=x onerror=alert(1)>' });
    const [mail] = await received();
    const shown = await fetch(`${fakes.origin}/mail/${mail?.id ?? ''}/html`);
    expect(shown.headers.get('content-security-policy')).toMatch(/^sandbox (?!.*allow-scripts)/);
    expect(await (await fetch(`${fakes.origin}/mail`)).text()).not.toContain('<img');
    expect(await (await fetch(`${fakes.origin}/mail/${mail?.id ?? ''}`)).text()).toContain(
      'sandbox="allow-popups allow-popups-to-escape-sandbox"',
    );
  });
});

it('a Message-ID has the form of RFC 5322, in the domain the mail comes from', () => {
  expect(messageIdFor('digest:2026-W49', 'Ohmstead <stores@ohmstead.example>')).toMatch(
    /^<[0-9a-f]{40}@ohmstead\.example>$/,
  );
  expect(messageIdFor('digest:2026-W49', 'stores@ohmstead.example')).toBe(
    messageIdFor('digest:2026-W49', 'Ohmstead <stores@ohmstead.example>'),
  );
});

/** The pages that a person opens beside the checkout: overview, payments, mail, files; and the mailbox as JSON. */
import { money } from './checkout-page';
import { type Answer, type Call, json, text } from './http';
import type { Mailbox, StoredMail } from './mailbox';
import { type Html, STYLE, markup, moment, page, raw, table } from './page';
import type { PaymentRules } from './payment-rules';
import type { Troubles } from './trouble';
import type { Uploads } from './uploads';
import type { Webhooks } from './webhooks';

export type Shown = { rules: PaymentRules; webhooks: Webhooks; mailbox: Mailbox; uploads: Uploads; troubles: Troubles };

const MOST_WAIT_MS = 30_000;
const MOST_ROWS = 200;

/** Null for a path that is no page. */
export async function pages(call: Call, shown: Shown): Promise<Answer | null> {
  if (call.path === '/style.css')
    return { status: 200, headers: { 'content-type': 'text/css; charset=utf-8' }, body: STYLE };
  if (call.path === '/') return overview(shown);
  if (call.path === '/payments') return payments(shown);
  if (call.path === '/files') return files(shown);
  if (call.path === '/mail') return mailList(shown);
  if (call.path === '/mail.json') return mailJson(call, shown.mailbox);
  const [, area, id, part, index] = call.path.split('/');
  if (area !== 'mail' || !id) return null;
  const mail = shown.mailbox.find(id);
  if (!mail) return page('No such mail', markup`<p>It may have been cleared.</p>`, { status: 404 });
  if (part === undefined) return mailPage(mail);
  if (part === 'html') return mailHtml(mail);
  if (part === 'source.eml') return download(shown.mailbox.source(id), 'message/rfc822', `${id}.eml`);
  const attachment = part === 'attachments' ? mail.attachments[Number(index)] : undefined;
  return attachment
    ? download(shown.mailbox.attachment(id, Number(index)), attachment.contentType, attachment.filename)
    : null;
}

function overview({ rules, webhooks, mailbox, uploads, troubles }: Shown): Answer {
  const sessions = Object.values(rules.state.sessions);
  return page(
    'Stand-ins for the hosted services',
    markup`<p>What Ohmstead would send to its payment provider, upload store and mail server ends here.</p>
<dl>
<dt><a href="/payments">Payments</a></dt><dd>${sessions.filter((session) => session.paid).length} paid, ${sessions.filter((session) => session.status === 'open').length} open, ${webhooks.list().filter((delivery) => delivery.state === 'held').length} events held</dd>
<dt><a href="/mail">Mail</a></dt><dd>${mailbox.mails.length}</dd>
<dt><a href="/files">Files</a></dt><dd>${Object.keys(uploads.state.files).length}</dd>
<dt>Trouble ordered</dt><dd>${troubles.list().length}</dd>
</dl>`,
  );
}

function payments({ rules, webhooks }: Shown): Answer {
  const { sessions, refunds } = rules.state;
  const sessionRows = newest(Object.values(sessions)).map((session) => [
    moment(session.createdSeconds * 1000),
    session.clientReference ?? '',
    money(session.amountMinor, session.currency),
    session.status,
    link(`/checkout/${session.id}`, session.id),
  ]);
  const refundRows = newest(Object.values(refunds)).map((refund) => {
    const session = rules.state.sessions[rules.getIntent(rules.getCharge(refund.chargeId).intentId).sessionId];
    return [
      moment(refund.createdSeconds * 1000),
      session ? money(refund.amountMinor, session.currency) : String(refund.amountMinor),
      refund.transferReversalId ? 'taken back from the supplier' : 'not taken back',
      refund.id,
    ];
  });
  const eventRows = newest(webhooks.list()).map((delivery) => [
    delivery.type,
    delivery.state,
    delivery.attempts.map((attempt) => attempt.outcome).join(', '),
    delivery.eventId,
  ]);
  return page(
    'Payments',
    markup`${table('Checkout sessions', ['Made', 'For', 'Amount', 'State', 'Page'], sessionRows, 'None yet.')}
${table('Refunds', ['Made', 'Amount', 'Transfer', 'Id'], refundRows, 'None yet.')}
${table('Events sent', ['Event', 'State', 'Answers', 'Id'], eventRows, 'None yet.')}`,
  );
}

function files({ uploads }: Shown): Answer {
  const rows = newest(Object.values(uploads.state.files)).map((file) => [
    file.uploadedAtMs ? moment(file.uploadedAtMs) : 'not complete',
    file.name,
    `${file.received} of ${file.size}`,
    file.type,
    file.isPrivate ? 'private' : 'public',
    file.callback,
    link(`/files/${encodeURIComponent(file.key)}`, 'download'),
  ]);
  return page(
    'Files',
    table(
      'In the store',
      ['Received', 'Name', 'Bytes', 'Claimed type', 'Access', 'Callback', 'File'],
      rows,
      'No file has been uploaded.',
    ),
  );
}

/** A file for the person at this machine, who needs no signed address. */
export function filePage(call: Call, uploads: Uploads): Answer | null {
  if (!call.path.startsWith('/files/')) return null;
  const file = uploads.state.files[call.path.slice('/files/'.length)];
  return file ? download(uploads.bytesOf(file.key), 'application/octet-stream', file.name) : text(404, 'No such file.');
}

function mailList({ mailbox }: Shown): Answer {
  const rows = newest(mailbox.mails).map((mail) => [
    moment(mail.receivedAtMs),
    mail.to.join(', '),
    link(`/mail/${mail.id}`, mail.subject),
    mail.attachments.length === 0 ? '' : String(mail.attachments.length),
    mail.repeatOf ? 'sent again' : '',
  ]);
  return page('Mail', table('Received', ['When', 'To', 'Subject', 'Attachments', ''], rows, 'No mail has come.'));
}

function mailPage(mail: StoredMail): Answer {
  const attachments = mail.attachments.map(
    (attachment, at) =>
      markup`<li><a href="/mail/${mail.id}/attachments/${at}">${attachment.filename}</a> (${attachment.contentType}, ${attachment.size} bytes)</li>`,
  );
  return page(
    mail.subject,
    markup`<dl><dt>From</dt><dd>${mail.from}</dd><dt>To</dt><dd>${mail.to.join(', ')}</dd><dt>Received</dt><dd>${moment(mail.receivedAtMs)}</dd>
<dt>Message-ID</dt><dd><code>${mail.messageId ?? 'none'}</code>${mail.repeatOf ? markup` (sent again; <a href="/mail/${mail.repeatOf}">first time</a>)` : raw('')}</dd></dl>
${attachments.length > 0 ? markup`<h2>Attachments</h2><ul>${attachments}</ul>` : raw('')}
${mail.links.length > 0 ? markup`<h2>Links in it</h2><ul>${mail.links.map((address) => markup`<li><a href="${address}">${address}</a></li>`)}</ul>` : raw('')}
${mail.html === null ? raw('') : markup`<h2>As shown</h2><iframe title="The mail as shown" sandbox="allow-popups allow-popups-to-escape-sandbox" src="/mail/${mail.id}/html"></iframe>`}
<h2>As text</h2><pre>${mail.text === '' ? '(no text part)' : mail.text}</pre>
<p><a href="/mail/${mail.id}/source.eml">Source</a></p>`,
    { frames: true },
  );
}

// Whatever a mail contains, it runs no script and fetches nothing.
function mailHtml(mail: StoredMail): Answer {
  return {
    status: 200,
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy':
        "sandbox allow-popups allow-popups-to-escape-sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:; frame-ancestors 'self'",
    },
    body: `<base target="_blank">${mail.html ?? ''}`,
  };
}

async function mailJson(call: Call, mailbox: Mailbox): Promise<Answer> {
  const number = (name: string, fallback: number, most: number): number => {
    const value = Number(call.query.get(name) ?? fallback);
    return Number.isFinite(value) ? Math.min(most, Math.max(0, value)) : fallback;
  };
  const wanted = {
    to: call.query.get('to'),
    subject: call.query.get('subject'),
    messageId: call.query.get('messageId'),
  };
  const mails = await mailbox.matching(wanted, number('count', 1, MOST_ROWS), number('waitMs', 0, MOST_WAIT_MS));
  return json(
    200,
    mails.slice(0, MOST_ROWS).map((mail) => ({
      ...mail,
      attachments: mail.attachments.map((attachment, at) => ({
        ...attachment,
        href: `/mail/${mail.id}/attachments/${at}`,
      })),
    })),
  );
}

function download(bytes: Buffer | null, contentType: string, name: string): Answer {
  if (!bytes) return text(404, 'No such file.');
  return {
    status: 200,
    headers: {
      'content-type': contentType,
      'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(name)}`,
      'content-security-policy': 'sandbox',
    },
    body: bytes,
  };
}

const link = (href: string, words: string): Html => markup`<a href="${href}">${words}</a>`;
const newest = <Item>(items: readonly Item[]): Item[] => items.slice(-MOST_ROWS).toReversed();

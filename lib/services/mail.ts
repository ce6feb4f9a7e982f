/**
 * Mail over SMTP; the only file that imports nodemailer. Called from jobs, which run at least once: the Message-ID comes
 * from the mail's cause, so a repeat is recognisable at the receiver.
 */
import 'server-only';
import { createHash } from 'node:crypto';
import { createTransport, type Transporter } from 'nodemailer';
import { environment } from './environment';

export type Mail = {
  /** One address or several. */
  to: string | readonly string[];
  subject: string;
  text: string;
  html?: string;
  attachments?: readonly { filename: string; contentType: string; content: Uint8Array }[];
  /** What the mail is about, down to the occasion: "order-sent:ORDER:REVISION". The same text gives the same Message-ID. */
  messageIdFrom: string;
};

export type MailFailure = {
  ok: false;
  /** refused: it will never be taken as it is; later: the server says try again; unreachable: no answer, so it may have been sent. */
  reason: 'refused' | 'later' | 'unreachable';
  message: string;
};

/** Hands a mail to the server. Safe to repeat: whoever got it already can tell by its Message-ID. */
export async function sendMail(mail: Mail): Promise<{ ok: true; messageId: string } | MailFailure> {
  const { from } = environment().mail;
  const messageId = messageIdFor(mail.messageIdFrom, from);
  try {
    const sent = await transport().sendMail({
      from,
      to: typeof mail.to === 'string' ? mail.to : [...mail.to],
      subject: mail.subject,
      text: mail.text,
      ...(mail.html === undefined ? {} : { html: mail.html }),
      attachments: (mail.attachments ?? []).map(({ filename, contentType, content }) => ({
        filename,
        contentType,
        content: Buffer.from(content),
      })),
      messageId,
      headers: { 'Auto-Submitted': 'auto-generated' },
      // A path or address in a field of ours must never become a file or a fetched page.
      disableFileAccess: true,
      disableUrlAccess: true,
    });
    if (sent.rejected.length > 0)
      return { ok: false, reason: 'refused', message: `the server refused ${sent.rejected.length} of the recipients` };
    return { ok: true, messageId };
  } catch (error) {
    return failureFrom(error);
  }
}

/** The Message-ID (RFC 5322 3.6.4) of a cause, in the domain the mail comes from. */
export function messageIdFor(cause: string, from: string): string {
  const domain = /@([^@>\s]+)>?$/.exec(from)?.[1] ?? 'localhost';
  return `<${createHash('sha256').update(cause).digest('hex').slice(0, 40)}@${domain}>`;
}

// nodemailer waits for minutes by default; SMTP_URL may set others (milliseconds).
const LIMITS_MS = { connectionTimeout: 5_000, greetingTimeout: 5_000, socketTimeout: 20_000 };

type Sent = { rejected: unknown[] };
let made: Transporter<Sent> | undefined;

function transport(): Transporter<Sent> {
  if (made) return made;
  const url = new URL(environment().mail.smtpUrl);
  for (const [name, limitMs] of Object.entries(LIMITS_MS)) {
    if (!url.searchParams.has(name)) url.searchParams.set(name, String(limitMs));
  }
  made = createTransport(url.href);
  return made;
}

function failureFrom(error: unknown): MailFailure {
  if (!(error instanceof Error)) throw error;
  const code = 'code' in error && typeof error.code === 'string' ? error.code : '';
  const responseCode = 'responseCode' in error && typeof error.responseCode === 'number' ? error.responseCode : 0;
  if (responseCode >= 500) return { ok: false, reason: 'refused', message: error.message };
  if (responseCode >= 400) return { ok: false, reason: 'later', message: error.message };
  if (code === 'EENVELOPE') return { ok: false, reason: 'refused', message: error.message };
  if (['ECONNECTION', 'ESOCKET', 'ETIMEDOUT', 'EDNS', 'ETLS', 'EPROTOCOL', 'ECONNREFUSED', 'ECONNRESET'].includes(code))
    return { ok: false, reason: 'unreachable', message: error.message };
  // Anything else is a bug of ours.
  throw error;
}

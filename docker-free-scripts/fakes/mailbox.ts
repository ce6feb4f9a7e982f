/** The mailbox: an SMTP server that takes mail for anybody, keeps it, and sends nothing on. */
import { createHash, randomUUID } from 'node:crypto';
import type { Socket } from 'node:net';
import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import type { Storage } from './storage';
import { type Troubles, delay } from './trouble';

export type StoredMail = {
  id: string;
  receivedAtMs: number;
  messageId: string | null;
  /** The id of an earlier mail with the same Message-ID: the sender's repeat of the same cause. */
  repeatOf: string | null;
  from: string;
  /** Envelope recipients: whom it would really have reached. */
  to: string[];
  subject: string;
  text: string;
  html: string | null;
  links: string[];
  attachments: { filename: string; contentType: string; size: number; sha256: string }[];
};

const MOST_MAIL_BYTES = 25 * 1024 * 1024;
const MOST_MAILS = 500;
const MOST_LINKS = 50;

export class Mailbox {
  mails: StoredMail[];
  private readonly storage: Storage;
  private readonly troubles: Troubles;
  private readonly sockets = new Map<number, Socket>();
  private watchers: (() => void)[] = [];
  private readonly server: SMTPServer;

  constructor(storage: Storage, troubles: Troubles, saved: StoredMail[]) {
    this.storage = storage;
    this.troubles = troubles;
    this.mails = saved;
    this.server = new SMTPServer({
      banner: 'Ohmstead stand-in, mail goes nowhere',
      // Its built-in certificate has expired, and nothing here leaves the machine.
      disabledCommands: ['STARTTLS'],
      authOptional: true,
      size: MOST_MAIL_BYTES,
      disableReverseLookup: true,
      onData: (stream, session, done) => {
        void this.take(stream, session).then(
          (outcome) => {
            if (outcome !== 'cut') done(outcome);
          },
          (error: unknown) => done(error instanceof Error ? error : new Error('unreadable mail')),
        );
      },
    });
    this.server.server.on('connection', (socket: Socket) => {
      const port = socket.remotePort;
      if (port === undefined) return;
      this.sockets.set(port, socket);
      socket.on('close', () => this.sockets.delete(port));
    });
    // A client that goes away in the middle is the client's matter; without a listener it would end the process.
    this.server.on('error', (error) => process.stderr.write(`mail: ${error.message}\n`));
  }

  listen(port: number): Promise<void> {
    return new Promise((resolve, reject) => {
      this.server.server.once('error', reject);
      this.server.listen(port, '127.0.0.1', () => resolve());
    });
  }

  close(): void {
    for (const socket of this.sockets.values()) socket.destroy();
    this.server.close(() => undefined);
  }

  find(id: string): StoredMail | null {
    return this.mails.find((mail) => mail.id === id) ?? null;
  }

  attachment(id: string, at: number): Buffer | null {
    return this.storage.findBytes(`mail:${id}:${at}`);
  }

  source(id: string): Buffer | null {
    return this.storage.findBytes(`mail:${id}:source`);
  }

  /** The mails that match, newest first, as soon as there are `count` of them or the time is over. */
  async matching(
    wanted: { to: string | null; subject: string | null; messageId: string | null },
    count: number,
    waitMs: number,
  ): Promise<StoredMail[]> {
    const matches = () =>
      this.mails
        .filter(
          (mail) =>
            (wanted.to === null || mail.to.includes(wanted.to.toLowerCase())) &&
            (wanted.subject === null || mail.subject.includes(wanted.subject)) &&
            (wanted.messageId === null || mail.messageId === wanted.messageId),
        )
        .toReversed();
    const deadline = Date.now() + waitMs;
    while (matches().length < count && Date.now() < deadline) {
      await Promise.race([new Promise<void>((resolve) => this.watchers.push(resolve)), delay(deadline - Date.now())]);
    }
    return matches();
  }

  clear(): void {
    for (const mail of this.mails) this.dropBytes(mail);
    this.mails = [];
    this.storage.changed();
  }

  private async take(stream: SMTPServerDataStream, session: SMTPServerSession): Promise<'cut' | Error | null> {
    const chunks: Buffer[] = [];
    for await (const chunk of stream) chunks.push(Buffer.from(chunk));
    if (stream.sizeExceeded) return refusal(552, 'Message is larger than 25 MB');
    const to = session.envelope.rcptTo.map((recipient) => recipient.address.toLowerCase());
    const trouble = this.troubles.take('mail', `MAIL ${to.join(' ')}`);
    if (trouble?.delayMs) await delay(trouble.delayMs);
    if (trouble?.status)
      return trouble.status >= 500 ? refusal(554, 'Refused, as ordered') : refusal(451, 'Try again later, as ordered');
    if (trouble?.drop === 'before') return this.cut(session);
    const source = Buffer.concat(chunks);
    this.keep(source, await simpleParser(source, { skipTextLinks: true }), to);
    return trouble?.drop === 'after' ? this.cut(session) : null;
  }

  private cut(session: SMTPServerSession): 'cut' {
    this.sockets.get(session.remotePort)?.destroy();
    return 'cut';
  }

  private keep(source: Buffer, parsed: ParsedMail, to: string[]): void {
    const id = randomUUID();
    const messageId = parsed.messageId ?? null;
    const html = typeof parsed.html === 'string' ? parsed.html : null;
    const mail: StoredMail = {
      id,
      receivedAtMs: Date.now(),
      messageId,
      repeatOf: messageId === null ? null : (this.mails.find((earlier) => earlier.messageId === messageId)?.id ?? null),
      from: parsed.from?.text ?? '',
      to,
      subject: parsed.subject ?? '(no subject)',
      text: parsed.text ?? '',
      html,
      links: linksIn(parsed.text ?? '', html ?? ''),
      attachments: parsed.attachments.map((attachment, at) => ({
        filename: attachment.filename ?? `attachment-${at + 1}`,
        contentType: attachment.contentType,
        size: attachment.content.length,
        sha256: createHash('sha256').update(attachment.content).digest('hex'),
      })),
    };
    this.storage.putBytes(`mail:${id}:source`, source);
    parsed.attachments.forEach((attachment, at) => this.storage.putBytes(`mail:${id}:${at}`, attachment.content));
    this.mails.push(mail);
    for (const old of this.mails.splice(0, Math.max(0, this.mails.length - MOST_MAILS))) this.dropBytes(old);
    this.storage.changed();
    const watchers = this.watchers;
    this.watchers = [];
    for (const watcher of watchers) watcher();
  }

  private dropBytes(mail: StoredMail): void {
    this.storage.dropBytes(`mail:${mail.id}:source`);
    mail.attachments.forEach((_, at) => this.storage.dropBytes(`mail:${mail.id}:${at}`));
  }
}

function refusal(responseCode: number, message: string): Error {
  return Object.assign(new Error(message), { responseCode });
}

function linksIn(text: string, html: string): string[] {
  const inText = text.match(/https?:\/\/[^\s<>"')]+/g) ?? [];
  const inHtml = [...html.matchAll(/href="(https?:\/\/[^"]+)"/g)].map((match) =>
    (match[1] ?? '').replaceAll('&amp;', '&'),
  );
  return [...new Set([...inText, ...inHtml])].slice(0, MOST_LINKS);
}

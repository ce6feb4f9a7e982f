/** Mails of signing in, written to the outbox of the same transaction as what they tell of. */
import 'server-only';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { authMail } from '@/db/schema/records';

export interface MailPayload extends Record<string, unknown> {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  /** What caused it; the Message-ID is derived from it, so that a repeat is recognisable. */
  readonly cause: string;
}

/** A mail in plain words with one link; `lines` stand above it. */
export function letter(
  greeting: string,
  lines: readonly string[],
  link: string | null,
  after: readonly string[] = [],
): string {
  return [
    `Hello ${greeting},`,
    '',
    ...lines,
    ...(link === null ? [] : ['', link]),
    ...(after.length ? ['', ...after] : []),
    '',
    'Ohmstead',
  ].join('\n');
}

export async function queueAuthMail(tx: Tx, mail: MailPayload): Promise<void> {
  await tx.insert(authMail).values({ id: newId(), payload: mail });
}

/** Links in mails lead to our own address, never to what a request's Host header says. */
export function ownUrl(path: string): string {
  return new URL(path, process.env.NEXTAUTH_URL ?? 'http://127.0.0.1:4600').toString();
}

/** A sign-in link or a password reset by mail. The answer is the same whether the address has an account or not. */
import 'server-only';
import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { type Tx, withScope } from '@/db/client';
import { oneTimeLink, person } from '@/db/schema/people';
import { open } from '@/lib/api/use-case';
import { letter, ownUrl, queueAuthMail } from '@/lib/auth/auth-mail';
import { hashToken, newToken } from '@/lib/auth/one-time-token';
import { countTry } from '@/lib/auth/rate-limit';

const LINK_MINUTES = 20;

export const email = () => z.string().trim().toLowerCase().max(254).pipe(z.email('is not an e-mail address'));

async function mailLink(tx: Tx, address: string, purpose: 'sign-in' | 'password-reset'): Promise<void> {
  const [found] = await tx
    .select({ id: person.id, name: person.name, email: person.email })
    .from(person)
    .where(eq(person.email, address));
  if (!found) return;
  const token = newToken();
  await tx.insert(oneTimeLink).values({
    tokenHash: hashToken(token),
    personId: found.id,
    purpose,
    expiresAt: new Date(Date.now() + LINK_MINUTES * 60_000),
  });
  const path = purpose === 'sign-in' ? '/sign-in/link' : '/password-reset/new';
  const [subject, said] =
    purpose === 'sign-in'
      ? ['Your sign-in link', 'This link signs you in once:']
      : ['Set a new password', 'This link lets you set a new password, once:'];
  await queueAuthMail(tx, {
    to: found.email,
    subject,
    // In the fragment, so that it reaches no server log and no referrer.
    text: letter(found.name, [said], ownUrl(`${path}#${token}`), [
      `It holds for ${LINK_MINUTES} minutes. If you did not ask for it, leave it.`,
    ]),
    cause: `${purpose}:${hashToken(token)}`,
  });
}

const accepted = z.object({ accepted: z.literal(true) });

export const askForSignInLink = open({
  name: 'people.ask-for-sign-in-link',
  http: 'POST /sign-in-links',
  summary: 'Mail a one-time sign-in link, if the address has an account.',
  input: z.strictObject({ email: email() }),
  output: accepted,
  async run({ input, address }) {
    await countTry('mail', input.email, address);
    await withScope('auth', (tx) => mailLink(tx, input.email, 'sign-in'));
    return { accepted: true as const };
  },
});

export const askForPasswordReset = open({
  name: 'people.ask-for-password-reset',
  http: 'POST /password-resets',
  summary: 'Mail a one-time link to set a new password, if the address has an account.',
  input: z.strictObject({ email: email() }),
  output: accepted,
  async run({ input, address }) {
    await countTry('mail', input.email, address);
    await withScope('auth', (tx) => mailLink(tx, input.email, 'password-reset'));
    return { accepted: true as const };
  },
});

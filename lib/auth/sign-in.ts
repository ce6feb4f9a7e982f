/** The three ways in that the sign-in page offers, as next-auth's providers call them. Each answers a session or null, never why. */
import 'server-only';
import { and, asc, eq, gt, isNull } from 'drizzle-orm';
import { type Tx, withScope } from '@/db/client';
import { membership, oneTimeLink, person } from '@/db/schema/people';
import { hashToken, TOKEN_PATTERN } from './one-time-token';
import { passwordFits } from './password';
import { countTry, forgetTries } from './rate-limit';

/** What goes into the signed session token. */
export interface SignedIn {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly workshopId: string;
  readonly sessionEpoch: number;
}

/** Throws Refusal `too-many`; null for a wrong address or password alike. */
export async function signInByPassword(email: string, password: string, address: string): Promise<SignedIn | null> {
  await countTry('sign-in', email, address);
  const found = await withScope('auth', async (tx) => {
    const [row] = await tx.select().from(person).where(eq(person.email, email.trim().toLowerCase()));
    return row ?? null;
  });
  if (!(await passwordFits(password, found?.passwordHash ?? null)) || !found) return null;
  await forgetTries('sign-in', email);
  return withScope('auth', (tx) => sessionOf(tx, found.id));
}

/** Uses the link up; null when it is unknown, used or too old. */
export async function signInByLink(token: string): Promise<SignedIn | null> {
  if (!TOKEN_PATTERN.test(token)) return null;
  return withScope('auth', async (tx) => {
    const [used] = await tx
      .update(oneTimeLink)
      .set({ usedAt: new Date() })
      .where(
        and(
          eq(oneTimeLink.tokenHash, hashToken(token)),
          eq(oneTimeLink.purpose, 'sign-in'),
          isNull(oneTimeLink.usedAt),
          gt(oneTimeLink.expiresAt, new Date()),
        ),
      )
      .returning({ personId: oneTimeLink.personId });
    return used ? sessionOf(tx, used.personId) : null;
  });
}

/** The session of a person in the workshop asked for, or in the one they joined first; null where they belong to none. */
export async function sessionOf(tx: Tx, personId: string, workshopId?: string): Promise<SignedIn | null> {
  const [row] = await tx
    .select({
      id: person.id,
      name: person.name,
      email: person.email,
      sessionEpoch: person.sessionEpoch,
      workshopId: membership.workshopId,
    })
    .from(person)
    .innerJoin(membership, eq(membership.personId, person.id))
    .where(
      and(
        eq(person.id, personId),
        isNull(membership.endedAt),
        workshopId === undefined ? undefined : eq(membership.workshopId, workshopId),
      ),
    )
    .orderBy(asc(membership.createdAt))
    .limit(1);
  return row ?? null;
}

/** A new password by a reset link. It ends every session of the person and uses up every open link. */
import 'server-only';
import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import { withScope } from '@/db/client';
import { oneTimeLink, person } from '@/db/schema/people';
import { Refusal } from '@/lib/api/problem';
import { open } from '@/lib/api/use-case';
import { hashToken, TOKEN_PATTERN } from '@/lib/auth/one-time-token';
import { hashPassword, LONGEST_PASSWORD, SHORTEST_PASSWORD } from '@/lib/auth/password';
import { countTry } from '@/lib/auth/rate-limit';

export const token = () => z.string().regex(TOKEN_PATTERN, 'is not a link of ours');
export const newPassword = () =>
  z
    .string()
    .min(SHORTEST_PASSWORD, `must have at least ${SHORTEST_PASSWORD} characters`)
    .max(LONGEST_PASSWORD, `may have at most ${LONGEST_PASSWORD} characters`);

export const setPassword = open({
  name: 'people.set-password',
  http: 'POST /password-resets/use',
  summary: 'Set a new password with the token of a reset link.',
  input: z.strictObject({ token: token(), password: newPassword() }),
  output: z.object({ email: z.string() }),
  async run({ input, address }) {
    await countTry('token', hashToken(input.token), address);
    const passwordHash = await hashPassword(input.password);
    return withScope('auth', async (tx) => {
      const [used] = await tx
        .update(oneTimeLink)
        .set({ usedAt: new Date() })
        .where(
          and(
            eq(oneTimeLink.tokenHash, hashToken(input.token)),
            eq(oneTimeLink.purpose, 'password-reset'),
            isNull(oneTimeLink.usedAt),
            gt(oneTimeLink.expiresAt, new Date()),
          ),
        )
        .returning({ personId: oneTimeLink.personId });
      if (!used) throw new Refusal('not-found', 'This link was used already or is too old. Ask for a new one.');
      await tx
        .update(oneTimeLink)
        .set({ usedAt: new Date() })
        .where(and(eq(oneTimeLink.personId, used.personId), isNull(oneTimeLink.usedAt)));
      const [changed] = await tx
        .update(person)
        .set({ passwordHash, sessionEpoch: sql`${person.sessionEpoch} + 1` })
        .where(eq(person.id, used.personId))
        .returning({ email: person.email });
      if (!changed) throw new Refusal('not-found', 'This account is not there any more.');
      return changed;
    });
  },
});

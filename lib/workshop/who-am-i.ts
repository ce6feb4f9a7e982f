/** Who is signed in, with which roles, and the other workshops they may change to; and ending all their sessions. */
import 'server-only';
import { asc, and, eq, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import { inScope, withScope } from '@/db/client';
import { membership, person, workshop } from '@/db/schema/people';
import { id } from '@/lib/api/fields';
import { errand, query } from '@/lib/api/use-case';
import { ROLES } from '@/lib/auth/actor';

export const whoAmI = query({
  name: 'people.who-am-i',
  http: 'GET /me',
  summary: 'The signed-in person, their roles and workshops.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.object({
    personId: id(),
    name: z.string(),
    email: z.string(),
    roles: z.array(z.enum(ROLES)),
    workshop: z.object({ id: id(), name: z.string() }),
    workshops: z.array(z.object({ id: id(), name: z.string() })),
  }),
  async run({ tx, actor }) {
    // The other workshops lie outside this one's rows: the auth scope is the only place that sees all memberships.
    const workshops = await inScope(tx, 'auth', () =>
      tx
        .select({ id: workshop.id, name: workshop.name })
        .from(membership)
        .innerJoin(workshop, eq(workshop.id, membership.workshopId))
        .where(and(eq(membership.personId, actor.personId), isNull(membership.endedAt)))
        .orderBy(asc(workshop.name)),
    );
    return {
      personId: actor.personId,
      name: actor.personName,
      email: actor.email,
      roles: [...actor.roles],
      workshop: { id: actor.workshopId, name: actor.workshopName },
      workshops,
    };
  },
});

export const endMySessions = errand({
  name: 'people.end-my-sessions',
  http: 'POST /me/end-sessions',
  summary: 'Sign out everywhere: every session of yours ends at once.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.object({ ended: z.literal(true) }),
  async run({ actor }) {
    await withScope('auth', (tx) =>
      tx
        .update(person)
        .set({ sessionEpoch: sql`${person.sessionEpoch} + 1` })
        .where(eq(person.id, actor.personId)),
    );
    return { ended: true as const };
  },
});

/** The people of the workshop and the invitations still open. */
import 'server-only';
import { and, asc, eq, gt, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { invitation, membership, person } from '@/db/schema/people';
import { id, instant } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { isRole, ROLES } from '@/lib/auth/actor';

/** A workshop is a handful of people; a list longer than this is not shown whole. */
const MOST_PEOPLE = 500;

export const listPeople = query({
  name: 'people.list',
  http: 'GET /people',
  summary: 'List the members of the workshop and its open invitations.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.object({
    people: z.array(
      z.object({
        personId: id(),
        name: z.string(),
        email: z.string(),
        roles: z.array(z.enum(ROLES)),
        since: instant(),
        you: z.boolean(),
      }),
    ),
    invitations: z.array(
      z.object({ id: id(), email: z.string(), roles: z.array(z.enum(ROLES)), expiresAt: instant() }),
    ),
  }),
  async run({ tx, actor }) {
    const people = await tx
      .select({
        personId: person.id,
        name: person.name,
        email: person.email,
        roles: membership.roles,
        since: membership.createdAt,
      })
      .from(membership)
      .innerJoin(person, eq(person.id, membership.personId))
      .where(and(eq(membership.workshopId, actor.workshopId), isNull(membership.endedAt)))
      .orderBy(asc(person.name))
      .limit(MOST_PEOPLE);
    const invitations = await tx
      .select({ id: invitation.id, email: invitation.email, roles: invitation.roles, expiresAt: invitation.expiresAt })
      .from(invitation)
      .where(
        and(
          eq(invitation.workshopId, actor.workshopId),
          isNull(invitation.acceptedAt),
          isNull(invitation.withdrawnAt),
          gt(invitation.expiresAt, new Date()),
        ),
      )
      .orderBy(asc(invitation.createdAt))
      .limit(MOST_PEOPLE);
    return {
      people: people.map((one) => ({
        ...one,
        roles: one.roles.filter(isRole),
        since: one.since.toISOString(),
        you: one.personId === actor.personId,
      })),
      invitations: invitations.map((one) => ({
        ...one,
        roles: one.roles.filter(isRole),
        expiresAt: one.expiresAt.toISOString(),
      })),
    };
  },
});

/** Giving and taking roles, and ending somebody's membership. The last lead stays, or nobody could invite one again. */
import 'server-only';
import { and, eq, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { apiToken, membership } from '@/db/schema/people';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { ROLES } from '@/lib/auth/actor';
import { roles } from './invite-person';

/** Locks every lead of the workshop, so that two leads can't remove each other at once. */
async function refuseLosingLastLead(tx: Tx, workshopId: string, personId: string): Promise<void> {
  const leads = await tx
    .select({ personId: membership.personId })
    .from(membership)
    .where(
      and(eq(membership.workshopId, workshopId), isNull(membership.endedAt), sql`'lead' = any(${membership.roles})`),
    )
    .orderBy(membership.personId)
    .for('update');
  if (leads.length === 1 && leads[0]?.personId === personId)
    throw new Refusal('rule.forbids', 'This is the only lead. Make somebody else lead first.');
}

const memberIs = (workshopId: string, personId: string) =>
  and(eq(membership.workshopId, workshopId), eq(membership.personId, personId), isNull(membership.endedAt));

export const changeRoles = command({
  name: 'people.change-roles',
  http: 'POST /people/{personId}/roles',
  summary: 'Set the roles of a member.',
  roles: ['lead'],
  input: z.strictObject({ personId: id(), roles: roles() }),
  output: z.object({ personId: id(), roles: z.array(z.enum(ROLES)) }),
  async run({ tx, actor, input, record }) {
    if (!input.roles.includes('lead')) await refuseLosingLastLead(tx, actor.workshopId, input.personId);
    const [row] = await tx
      .update(membership)
      .set({ roles: input.roles })
      .where(memberIs(actor.workshopId, input.personId))
      .returning({ personId: membership.personId });
    if (!row) throw notFound('person');
    record(input.personId, { roles: input.roles });
    return { personId: row.personId, roles: input.roles };
  },
});

export const endMembership = command({
  name: 'people.end-membership',
  http: 'POST /people/{personId}/end',
  summary: 'End a membership: the person keeps their name in the ledger and loses every way in.',
  roles: ['lead'],
  input: z.strictObject({ personId: id() }),
  output: z.object({ personId: id() }),
  async run({ tx, actor, input, record }) {
    await refuseLosingLastLead(tx, actor.workshopId, input.personId);
    const [row] = await tx
      .update(membership)
      .set({ endedAt: new Date() })
      .where(memberIs(actor.workshopId, input.personId))
      .returning({ personId: membership.personId });
    if (!row) throw notFound('person');
    await tx
      .update(apiToken)
      .set({ revokedAt: new Date() })
      .where(
        and(
          eq(apiToken.workshopId, actor.workshopId),
          eq(apiToken.personId, input.personId),
          isNull(apiToken.revokedAt),
        ),
      );
    record(input.personId);
    return row;
  },
});

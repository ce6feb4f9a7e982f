/** The leads who may approve what somebody submitted: everybody with the role but the submitter. */
import 'server-only';
import { and, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership, person } from '@/db/schema/people';

export const leadsToAsk = (tx: Tx, workshopId: string, submitterId: string) =>
  tx
    .select({ personId: person.id, name: person.name, email: person.email })
    .from(membership)
    .innerJoin(person, eq(person.id, membership.personId))
    .where(
      and(
        eq(membership.workshopId, workshopId),
        isNull(membership.endedAt),
        ne(membership.personId, submitterId),
        sql`'lead' = any(${membership.roles})`,
      ),
    )
    .orderBy(person.id)
    .limit(20);

/** The person behind a session or token, loaded inside the use case's own transaction so that a revoked one is refused at once. */
import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { apiToken, membership, person, workshop } from '@/db/schema/people';
import { Refusal } from '@/lib/api/problem';
import { type Actor, isRole } from './actor';

/** What a verified session cookie or bearer token says; nothing else about the person is taken from it. */
export type Credentials =
  | { readonly via: 'session'; readonly personId: string; readonly workshopId: string; readonly sessionEpoch: number }
  | { readonly via: 'token'; readonly personId: string; readonly workshopId: string; readonly tokenId: string };

export async function loadActor(tx: Tx, credentials: Credentials): Promise<Actor> {
  const [row] = await tx
    .select({
      name: person.name,
      email: person.email,
      sessionEpoch: person.sessionEpoch,
      roles: membership.roles,
      workshopName: workshop.name,
    })
    .from(membership)
    .innerJoin(person, eq(person.id, membership.personId))
    .innerJoin(workshop, eq(workshop.id, membership.workshopId))
    .where(
      and(
        eq(membership.workshopId, credentials.workshopId),
        eq(membership.personId, credentials.personId),
        isNull(membership.endedAt),
      ),
    );
  if (!row) throw new Refusal('signed-out', 'You are not a member of this workshop any more.');
  let mayWrite = true;
  if (credentials.via === 'session') {
    if (row.sessionEpoch !== credentials.sessionEpoch)
      throw new Refusal('signed-out', 'This session was ended; sign in again.');
  } else {
    const [token] = await tx
      .select({ scope: apiToken.scope, expiresAt: apiToken.expiresAt, revokedAt: apiToken.revokedAt })
      .from(apiToken)
      .where(and(eq(apiToken.workshopId, credentials.workshopId), eq(apiToken.id, credentials.tokenId)));
    if (!token || token.revokedAt !== null || token.expiresAt.getTime() <= Date.now())
      throw new Refusal('signed-out', 'This API token is revoked or expired.');
    mayWrite = token.scope === 'write';
  }
  return {
    personId: credentials.personId,
    personName: row.name,
    email: row.email,
    workshopId: credentials.workshopId,
    workshopName: row.workshopName,
    roles: row.roles.filter(isRole),
    via: credentials.via,
    mayWrite,
  };
}

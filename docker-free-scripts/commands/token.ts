/**
 * Prints an API token for a person, for development: npm run -s token -- --email ADDRESS [--scope read|write] [--workshop NAME].
 * Refused with OHMSTEAD_SERVICES=live, where people make their own tokens on screen. Exit 2 with a sentence where it can't.
 */
import './load-environment';
import { parseArgs } from 'node:util';
import { and, asc, eq, isNull } from 'drizzle-orm';
import { closeDatabase, withScope, withWorkshop } from '@/db/client';
import { membership, person, workshop } from '@/db/schema/people';
import { issueToken } from '@/lib/workshop/api-tokens';

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: { email: { type: 'string' }, scope: { type: 'string', default: 'write' }, workshop: { type: 'string' } },
  });
  if (process.env.OHMSTEAD_SERVICES === 'live')
    throw new Error('not with live services: make a token under Workshop, API tokens');
  const { email, scope } = values;
  if (!email) throw new Error('say whose: --email ADDRESS');
  if (scope !== 'read' && scope !== 'write') throw new Error('--scope is read or write');
  const members = await withScope('auth', (tx) =>
    tx
      .select({ workshopId: membership.workshopId, personId: person.id, workshopName: workshop.name })
      .from(person)
      .innerJoin(membership, eq(membership.personId, person.id))
      .innerJoin(workshop, eq(workshop.id, membership.workshopId))
      .where(and(eq(person.email, email.toLowerCase()), isNull(membership.endedAt)))
      .orderBy(asc(membership.createdAt)),
  );
  const owner =
    values.workshop === undefined ? members[0] : members.find((one) => one.workshopName === values.workshop);
  if (!owner) throw new Error(`nobody with the address ${email} belongs to ${values.workshop ?? 'a workshop'}`);
  const { token } = await withWorkshop(owner.workshopId, (tx) =>
    issueToken(tx, { workshopId: owner.workshopId, personId: owner.personId }, 'development command', scope),
  );
  console.log(token);
}

try {
  await main();
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = 2;
} finally {
  await closeDatabase();
}

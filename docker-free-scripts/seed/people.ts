/** Two invented workshops and who works there. One password for all of them, made anew with every demo. */
import { withScope, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { membership, person, workshop } from '@/db/schema/people';
import type { Role } from '@/lib/auth/actor';
import type { Credentials } from '@/lib/auth/load-actor';
import { hashPassword } from '@/lib/auth/password';
import type { People } from './acting';

interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
}

export const FERNHOLLOW: readonly DemoPerson[] = [
  { name: 'R. Aske', email: 'builder@fernhollow.example', roles: ['builder'] },
  { name: 'I. Marlow', email: 'storekeeper@fernhollow.example', roles: ['storekeeper'] },
  { name: 'T. Quennell', email: 'buyer@fernhollow.example', roles: ['buyer'] },
  { name: 'M. Hathersage', email: 'lead@fernhollow.example', roles: ['lead'] },
  { name: 'E. Wisket', email: 'both@fernhollow.example', roles: ['builder', 'storekeeper'] },
];

export const LARKSPUR: readonly DemoPerson[] = [
  { name: 'O. Tamberlin', email: 'lead@larkspur.example', roles: ['lead', 'builder', 'storekeeper', 'buyer'] },
];

export async function makeWorkshop(
  name: string,
  letterhead: string,
  people: readonly DemoPerson[],
  password: string,
  alsoMembers: readonly { personId: string; roles: readonly Role[] }[] = [],
): Promise<{ id: string; people: People; ids: ReadonlyMap<string, string> }> {
  const id = newId();
  const passwordHash = await hashPassword(password);
  const ids = new Map(people.map((one) => [one.email, newId()]));
  await withScope('auth', (tx) =>
    tx
      .insert(person)
      .values(
        people.map((one) => ({ id: ids.get(one.email) ?? newId(), name: one.name, email: one.email, passwordHash })),
      ),
  );
  await withWorkshop(id, async (tx) => {
    await tx.insert(workshop).values({ id, name, letterhead, currency: 'EUR', approvalLimitMinor: 25_000 });
    await tx
      .insert(membership)
      .values([
        ...people.map((one) => ({ workshopId: id, personId: ids.get(one.email) ?? newId(), roles: [...one.roles] })),
        ...alsoMembers.map((one) => ({ workshopId: id, personId: one.personId, roles: [...one.roles] })),
      ]);
  });
  const whoHas = (role: Role): Credentials => {
    const found = people.find((one) => one.roles.includes(role));
    if (!found) throw new Error(`nobody in ${name} is ${role}`);
    return { via: 'session', personId: ids.get(found.email) ?? '', workshopId: id, sessionEpoch: 0 };
  };
  return {
    id,
    ids,
    people: {
      builder: whoHas('builder'),
      storekeeper: whoHas('storekeeper'),
      buyer: whoHas('buyer'),
      lead: whoHas('lead'),
    },
  };
}

/**
 * A fresh workshop for one test file, in the test database (DATABASE_URL, application role), with a person per role.
 * Tests act through perform(), the same path as routes and pages.
 */
import { withScope, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { membership, person, workshop } from '@/db/schema/people';
import type { Role } from '@/lib/auth/actor';
import type { Credentials } from '@/lib/auth/load-actor';
import { perform } from '@/lib/api/perform';
import type { Endpoint, UseCase } from '@/lib/api/use-case';
import type { z } from 'zod';

export interface TestWorkshop {
  readonly id: string;
  readonly as: Record<Role, Credentials>;
}

export async function makeWorkshop(name = 'Test Workshop'): Promise<TestWorkshop> {
  const id = newId();
  const people = (['builder', 'storekeeper', 'buyer', 'lead'] as const).map((role) => ({ role, personId: newId() }));
  await withScope('auth', (tx) =>
    tx.insert(person).values(
      people.map(({ role, personId }) => ({
        id: personId,
        email: `${role}.${personId}@example.invalid`,
        name: `Test ${role}`,
      })),
    ),
  );
  await withWorkshop(id, async (tx) => {
    await tx.insert(workshop).values({ id, name: `${name} ${id.slice(-6)}` });
    await tx
      .insert(membership)
      .values(people.map(({ role, personId }) => ({ workshopId: id, personId, roles: [role] })));
  });
  const credentials = (role: Role): Credentials => {
    const found = people.find((one) => one.role === role);
    if (!found) throw new Error(`no ${role}`);
    return { via: 'session', personId: found.personId, workshopId: id, sessionEpoch: 0 };
  };
  return {
    id,
    as: {
      builder: credentials('builder'),
      storekeeper: credentials('storekeeper'),
      buyer: credentials('buyer'),
      lead: credentials('lead'),
    },
  };
}

/** Performs a use case as a person would through the API; returns its output or throws the Refusal. */
export async function act<U extends UseCase & { http: Endpoint }>(
  useCase: U,
  credentials: Credentials | null,
  input: z.input<U['input']>,
  idempotencyKey: string | null = null,
): Promise<z.output<U['output']>> {
  const { output } = await perform(useCase, { credentials, input, requestId: newId(), idempotencyKey });
  return output;
}

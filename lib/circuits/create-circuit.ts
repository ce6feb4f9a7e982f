/** A new circuit: a name, its supply rails, and nothing else until a parts list comes. */
import 'server-only';
import { z } from 'zod';
import { circuit } from '@/db/schema/circuits';
import { id, words } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';

/** Signed volts of one rail; 0 V is earth and no rail. */
export const railVolts = z
  .number()
  .min(-60)
  .max(60)
  .refine((volts) => volts !== 0, 'earth (0 V) is not a rail');

export const createCircuit = command({
  name: 'circuits.create',
  http: 'POST /circuits',
  summary: 'Start a circuit that revisions of a parts list can be read into.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    name: words(120),
    description: z.string().trim().max(2_000).default(''),
    railsVolts: z.array(railVolts).max(6).default([]),
  }),
  output: z.object({ id: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const [made] = await tx
      .insert(circuit)
      .values({
        workshopId: actor.workshopId,
        name: input.name,
        description: input.description,
        railsVolts: input.railsVolts,
      })
      .returning({ id: circuit.id, version: circuit.version });
    if (!made) throw new Error('the insert returned no row');
    record(made.id, { name: input.name });
    return made;
  },
});

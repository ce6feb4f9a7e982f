/** Name, description and rails of a circuit. Other rails mean other verdicts, so its open revisions are weighed again. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { circuit, revision } from '@/db/schema/circuits';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { railVolts } from './create-circuit';

export const changeCircuit = command({
  name: 'circuits.change',
  http: 'PATCH /circuits/{circuitId}',
  summary: 'Change the name, the description or the supply rails of a circuit.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    circuitId: id(),
    version: z.number().int().min(1),
    name: words(120).optional(),
    description: z.string().trim().max(2_000).optional(),
    railsVolts: z.array(railVolts).max(6).optional(),
  }),
  output: z.object({ id: id(), version: z.number().int() }),
  async run({ tx, actor, input, record, enqueue }) {
    const own = and(eq(circuit.workshopId, actor.workshopId), eq(circuit.id, input.circuitId));
    const [before] = await tx.select().from(circuit).where(own).for('update');
    if (!before) throw notFound('circuit');
    if (before.version !== input.version)
      throw new Refusal(
        'version.stale',
        'Somebody changed this circuit since you looked. Nothing of yours was written.',
        { more: { version: before.version } },
      );
    const after = {
      name: input.name ?? before.name,
      description: input.description ?? before.description,
      railsVolts: input.railsVolts ?? before.railsVolts,
    };
    const [made] = await tx
      .update(circuit)
      .set({ ...after, version: sql`${circuit.version} + 1` })
      .where(own)
      .returning({ id: circuit.id, version: circuit.version });
    if (!made) throw new Error('a locked circuit is gone');
    if (after.railsVolts.join() !== before.railsVolts.join()) {
      const revisions = await tx
        .select({ id: revision.id })
        .from(revision)
        .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.circuitId, before.id)));
      for (const { id: revisionId } of revisions) await enqueue({ queue: 'match-revision', payload: { revisionId } });
    }
    record(made.id, { name: after.name, railsVolts: after.railsVolts });
    return made;
  },
});

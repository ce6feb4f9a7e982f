/** N units of a frozen revision to be made together: what each fitted line needs, with the part chosen for it. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { batch, revision } from '@/db/schema/circuits';
import { day, id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { nextNumber } from '@/lib/workshop/next-number';

const MOST_OF_A_LINE = 1_000_000_000;

/**
 * The part for each line: the newest decision of a person, or the best candidate that every check passes. Nothing that
 * changes a figure, asks or is refused is taken without somebody saying so. Also brings needs without a reservation up
 * to date when decisions changed since.
 */
export const chosenPart = sql`(
  select case when d.line_id is not null then d.part_id else k.part_id end
    from (select 1) as one
    left join lateral (select line_id, part_id from decision where workshop_id = l.workshop_id and line_id = l.id order by decided_at desc, id desc limit 1) d on true
    left join lateral (select c.part_id from candidate c join part p on p.workshop_id = c.workshop_id and p.id = c.part_id and p.retired_at is null
                        where c.workshop_id = l.workshop_id and c.line_id = l.id and c.verdict in ('same', 'drop-in') order by c.rank limit 1) k on true
)`;

export async function refreshNeeds(tx: Tx, workshopId: string, batchId: string): Promise<void> {
  await tx.execute(sql`
    update batch_need n set part_id = c.part_id
      from (select n2.id, ${chosenPart} as part_id
              from batch_need n2 join line l on l.workshop_id = n2.workshop_id and l.id = n2.line_id
             where n2.workshop_id = ${workshopId} and n2.batch_id = ${batchId}
               and not exists (select 1 from reservation r where r.workshop_id = n2.workshop_id and r.need_id = n2.id and r.quantity > r.released)) c
     where n.workshop_id = ${workshopId} and n.id = c.id and n.part_id is distinct from c.part_id`);
}

export const createBatch = command({
  name: 'batches.create',
  http: 'POST /batches',
  summary: 'Plan a batch of N units of a frozen revision.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    revisionId: id(),
    units: z.number().int('must be a whole number').min(1).max(10_000),
    neededBy: day().optional(),
    priority: z.number().int().min(1).max(9).default(5),
  }),
  output: z.object({ id: id(), number: z.string(), needs: z.number().int(), withoutPart: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const [from] = await tx
      .select({ id: revision.id, state: revision.state, name: revision.name })
      .from(revision)
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, input.revisionId)))
      .for('share');
    if (!from) throw notFound('revision');
    if (from.state !== 'frozen')
      throw new Refusal(
        'state.refused',
        `Revision ${from.name} is still a draft. Answer its questions and freeze it first.`,
      );
    // batch_need.quantity is an integer; a list that asks for more than that is a misreading.
    const most = await tx.execute<{ most: string | null }>(sql`
      select max(l.quantity::bigint * ${input.units})::text as most from line l where l.workshop_id = ${actor.workshopId} and l.revision_id = ${from.id} and l.fitted`);
    if (Number(most.rows[0]?.most ?? 0) > MOST_OF_A_LINE)
      throw new Refusal(
        'rule.forbids',
        `${input.units} units would need more than ${MOST_OF_A_LINE} of one line. Make smaller batches.`,
      );
    const number = await nextNumber(tx, actor.workshopId, 'batch');
    const [made] = await tx
      .insert(batch)
      .values({
        workshopId: actor.workshopId,
        number,
        revisionId: from.id,
        units: input.units,
        neededBy: input.neededBy ?? null,
        priority: input.priority,
        createdBy: actor.personId,
      })
      .returning({ id: batch.id });
    if (!made) throw new Error('the insert returned no row');
    const needs = await tx.execute<{ part_id: string | null }>(sql`
      insert into batch_need (workshop_id, id, batch_id, line_id, part_id, quantity)
      select l.workshop_id, gen_random_uuid(), ${made.id}, l.id, ${chosenPart}, l.quantity * ${input.units}
        from line l
       where l.workshop_id = ${actor.workshopId} and l.revision_id = ${from.id} and l.fitted and l.quantity > 0
      returning part_id`);
    if (needs.rows.length === 0)
      throw new Refusal('rule.forbids', `Revision ${from.name} has no fitted line that needs a part.`);
    const withoutPart = needs.rows.filter((need) => need.part_id === null).length;
    record(made.id, { number, units: input.units, needs: needs.rows.length, withoutPart });
    return { id: made.id, number, needs: needs.rows.length, withoutPart };
  },
});

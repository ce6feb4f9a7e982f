/** A frozen list changes by being copied: the copy is a draft with the same lines, decisions and original. */
import 'server-only';
import { eq, and, sql } from 'drizzle-orm';
import { z } from 'zod';
import { revision } from '@/db/schema/circuits';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { matchLines } from './match-revision';

export const copyRevision = command({
  name: 'revisions.copy',
  http: 'POST /revisions/{revisionId}/copy',
  summary: 'Copy a revision into a new draft under another name.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ revisionId: id(), name: words(60) }),
  output: z.object({ id: id(), name: z.string(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { workshopId } = actor;
    const [from] = await tx
      .select()
      .from(revision)
      .where(and(eq(revision.workshopId, workshopId), eq(revision.id, input.revisionId)))
      .for('share');
    if (!from) throw notFound('revision');
    if (from.state !== 'frozen')
      throw new Refusal('state.refused', `Revision ${from.name} is a draft: change it as it is.`);
    const [made] = await tx
      .insert(revision)
      .values({
        workshopId,
        circuitId: from.circuitId,
        name: input.name,
        uploadId: from.uploadId,
        reading: from.reading,
        createdBy: actor.personId,
      })
      .returning({ id: revision.id, name: revision.name, version: revision.version });
    if (!made) throw new Error('the insert returned no row');
    await tx.execute(sql`
      insert into line (workshop_id, id, revision_id, position, sheet, source_row, designators, quantity, fitted, kind, text, spec, part_number, family, value, unit, use, spec_key)
      select workshop_id, gen_random_uuid(), ${made.id}, position, sheet, source_row, designators, quantity, fitted, kind, text, spec, part_number, family, value, unit, use, spec_key
        from line where workshop_id = ${workshopId} and revision_id = ${from.id}`);
    await tx.execute(sql`
      insert into decision (workshop_id, id, line_id, part_id, verdict, reason, spec_key, decided_by, decided_at)
      select d.workshop_id, gen_random_uuid(), n.id, d.part_id, d.verdict, d.reason, d.spec_key, d.decided_by, d.decided_at
        from line o
        join line n on n.workshop_id = o.workshop_id and n.revision_id = ${made.id} and n.position = o.position
        join lateral (select * from decision where workshop_id = o.workshop_id and line_id = o.id order by decided_at desc, id desc limit 1) d on true
       where o.workshop_id = ${workshopId} and o.revision_id = ${from.id}`);
    await matchLines(tx, workshopId, made.id);
    record(made.id, { name: made.name, copiedFrom: from.id });
    return made;
  },
});

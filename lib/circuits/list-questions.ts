/** The open questions of a revision in the order of their rows. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id } from '@/lib/api/fields';

export const questionFields = z.object({
  id: id(),
  lineId: id().nullable(),
  sheet: z.string().nullable(),
  row: z.number().int(),
  code: z.string(),
  ask: z.string(),
  options: z.array(z.string()),
  /** The line's designators and its text, for the heading of the question. */
  designators: z.array(z.string()),
  text: z.string(),
});

export async function listQuestions(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  most: number,
): Promise<z.input<typeof questionFields>[]> {
  const found = await tx.execute<{ question: z.input<typeof questionFields> }>(sql`
    select json_build_object('id', q.id, 'lineId', q.line_id, 'sheet', q.sheet, 'row', q.source_row, 'code', q.code, 'ask', q.ask, 'options', q.options,
             'designators', coalesce(l.designators, '{}'), 'text', coalesce(l.text, '')) as question
      from question q left join line l on l.workshop_id = q.workshop_id and l.id = q.line_id
     where q.workshop_id = ${workshopId} and q.revision_id = ${revisionId} and q.answered_at is null
     order by q.sheet nulls first, q.source_row, q.id limit ${most}`);
  return found.rows.map(({ question }) => question);
}

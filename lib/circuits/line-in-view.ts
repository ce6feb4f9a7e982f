/** A line as the stand-in sheet needs it: its specification, its circuit's rails, what it is used for. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { notFound } from '@/lib/api/problem';
import { USES } from '@/lib/electronics/stand-in/check';
import { partSpecSchema } from './part-spec-schema';

export const lineInView = z.object({
  id: z.string(),
  revisionId: z.string(),
  revisionName: z.string(),
  revisionState: z.enum(['draft', 'frozen']),
  circuitId: z.string(),
  circuitName: z.string(),
  railsVolts: z.array(z.number()),
  designators: z.array(z.string()),
  quantity: z.number().int(),
  fitted: z.boolean(),
  text: z.string(),
  use: z.enum(USES).nullable(),
  spec: partSpecSchema,
  specKey: z.string(),
});
export type LineInView = z.output<typeof lineInView>;

export async function lookAtLine(tx: Tx, workshopId: string, lineId: string): Promise<LineInView> {
  const found = await tx.execute<{ line: unknown }>(sql`
    select json_build_object('id', l.id, 'revisionId', r.id, 'revisionName', r.name, 'revisionState', r.state, 'circuitId', c.id, 'circuitName', c.name, 'railsVolts', to_json(c.rails_volts),
             'designators', l.designators, 'quantity', l.quantity, 'fitted', l.fitted, 'text', l.text, 'use', l.use, 'spec', l.spec, 'specKey', l.spec_key) as line
      from line l
      join revision r on r.workshop_id = l.workshop_id and r.id = l.revision_id
      join circuit c on c.workshop_id = r.workshop_id and c.id = r.circuit_id
     where l.workshop_id = ${workshopId} and l.id = ${lineId}`);
  const row = found.rows[0];
  if (!row) throw notFound('line');
  return lineInView.parse(row.line);
}

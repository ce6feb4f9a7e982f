/** One circuit with its revisions, newest first, and the batches made of them. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, instant } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { BATCH_STATES } from './batch-states';

const detail = z.object({
  id: id(),
  name: z.string(),
  description: z.string(),
  railsVolts: z.array(z.number()),
  version: z.number().int(),
  createdAt: instant(),
  revisions: z.array(
    z.object({
      id: id(),
      name: z.string(),
      state: z.enum(['draft', 'frozen']),
      createdAt: instant(),
      createdBy: z.string(),
      frozenAt: instant().nullable(),
      fileName: z.string().nullable(),
      lines: z.number().int(),
      openQuestions: z.number().int(),
    }),
  ),
  batches: z.array(
    z.object({
      id: id(),
      number: z.string(),
      revisionId: id(),
      revisionName: z.string(),
      units: z.number().int(),
      state: z.enum(BATCH_STATES),
      neededBy: z.string().nullable(),
    }),
  ),
  /** Originals that could not be read; they are kept. */
  rejected: z.array(z.object({ id: id(), fileName: z.string(), createdAt: instant(), problem: z.unknown() })),
});

const MOST_SHOWN = 200;

export const getCircuit = query({
  name: 'circuits.get',
  http: 'GET /circuits/{circuitId}',
  summary: 'A circuit with its revisions, batches and the files that could not be read.',
  roles: 'everyone',
  input: z.strictObject({ circuitId: id() }),
  output: detail,
  async run({ tx, actor, input }) {
    const moment = (column: string) => sql.raw(`to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"')`);
    const found = await tx.execute<{ circuit: z.input<typeof detail> }>(sql`
      select json_build_object(
               'id', c.id, 'name', c.name, 'description', c.description, 'railsVolts', to_json(c.rails_volts), 'version', c.version, 'createdAt', ${moment('c.created_at')},
               'revisions', coalesce((
                 select json_agg(json_build_object('id', r.id, 'name', r.name, 'state', r.state, 'createdAt', ${moment('r.created_at')}, 'createdBy', coalesce(w.name, ''),
                          'frozenAt', ${moment('r.frozen_at')}, 'fileName', u.file_name,
                          'lines', (select count(*) from line l where l.workshop_id = r.workshop_id and l.revision_id = r.id),
                          'openQuestions', (select count(*) from question q where q.workshop_id = r.workshop_id and q.revision_id = r.id and q.answered_at is null))
                        order by r.created_at desc, r.id desc)
                   from (select * from revision r where r.workshop_id = c.workshop_id and r.circuit_id = c.id order by r.created_at desc, r.id desc limit ${MOST_SHOWN}) r
                   left join upload u on u.workshop_id = r.workshop_id and u.id = r.upload_id
                   left join person w on w.id = r.created_by), '[]'::json),
               'batches', coalesce((
                 select json_agg(json_build_object('id', b.id, 'number', b.number, 'revisionId', b.revision_id, 'revisionName', b.revision_name, 'units', b.units, 'state', b.state, 'neededBy', b.needed_by)
                        order by b.created_at desc, b.id desc)
                   from (select b.*, r.name as revision_name from batch b join revision r on r.workshop_id = b.workshop_id and r.id = b.revision_id
                          where r.workshop_id = c.workshop_id and r.circuit_id = c.id order by b.created_at desc, b.id desc limit ${MOST_SHOWN}) b), '[]'::json),
               'rejected', coalesce((
                 select json_agg(json_build_object('id', u.id, 'fileName', u.file_name, 'createdAt', ${moment('u.created_at')}, 'problem', u.problem) order by u.created_at desc)
                   from (select * from upload u where u.workshop_id = c.workshop_id and u.circuit_id = c.id and u.state = 'rejected' order by u.created_at desc limit 20) u), '[]'::json)
             ) as circuit
        from circuit c where c.workshop_id = ${actor.workshopId} and c.id = ${input.circuitId}`);
    const row = found.rows[0];
    if (!row) throw notFound('circuit');
    return row.circuit;
  },
});

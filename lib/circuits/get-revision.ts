/** One revision in figures: what it is, where its lines stand, what is still asked. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, instant } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { stood } from './line-standing';

const count = () => z.number().int();

const revisionFacts = z.object({
  id: id(),
  name: z.string(),
  state: z.enum(['draft', 'frozen']),
  version: count(),
  circuit: z.object({ id: id(), name: z.string(), railsVolts: z.array(z.number()) }),
  createdAt: instant(),
  createdBy: z.string(),
  frozenAt: instant().nullable(),
  upload: z.object({ id: id(), fileName: z.string(), sizeBytes: count(), state: z.string() }).nullable(),
  sheets: z.array(z.string()),
  lines: count(),
  designators: count(),
  notLines: count(),
  openQuestions: count(),
  /** Lines by where they stand; their sum is `lines`. */
  standings: z.object({ shelf: count(), effect: count(), ask: count(), buy: count(), 'not-fitted': count() }),
  /** Lines by verdict; lines without any candidate are in none. */
  verdicts: z.object({ same: count(), 'drop-in': count(), 'with-effect': count(), ask: count(), refused: count() }),
  /** The revision before it, to compare with. */
  earlier: z.object({ id: id(), name: z.string() }).nullable(),
});

export const getRevision = query({
  name: 'revisions.get',
  http: 'GET /revisions/{revisionId}',
  summary: 'A revision with its figures. `units` is how many circuits are to be made.',
  roles: 'everyone',
  input: z.strictObject({ revisionId: id(), units: z.coerce.number().int().min(1).max(10_000).default(1) }),
  output: revisionFacts,
  async run({ tx, actor, input }) {
    const { workshopId } = actor;
    const moment = (column: string) => sql.raw(`to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"')`);
    const standing = (name: string) => sql`(select count(*) from stood where standing = ${name})`;
    const verdict = (name: string) => sql`(select count(*) from stood where verdict = ${name})`;
    const found = await tx.execute<{ facts: z.input<typeof revisionFacts> }>(sql`
      with ${stood(workshopId, input.revisionId, input.units)}
      select json_build_object(
               'id', r.id, 'name', r.name, 'state', r.state, 'version', r.version,
               'circuit', json_build_object('id', c.id, 'name', c.name, 'railsVolts', to_json(c.rails_volts)),
               'createdAt', ${moment('r.created_at')}, 'createdBy', coalesce((select name from person where id = r.created_by), ''), 'frozenAt', ${moment('r.frozen_at')},
               'upload', (select json_build_object('id', u.id, 'fileName', u.file_name, 'sizeBytes', u.size_bytes, 'state', u.state) from upload u where u.workshop_id = r.workshop_id and u.id = r.upload_id),
               'sheets', coalesce(r.reading -> 'sheets', '[]'::jsonb),
               'lines', (select count(*) from stood),
               'designators', (select coalesce(sum(cardinality(l.designators)), 0) from line l where l.workshop_id = r.workshop_id and l.revision_id = r.id),
               'notLines', coalesce((r.reading ->> 'notLineCount')::int, 0),
               'openQuestions', (select count(*) from question q where q.workshop_id = r.workshop_id and q.revision_id = r.id and q.answered_at is null),
               'standings', json_build_object('shelf', ${standing('shelf')}, 'effect', ${standing('effect')}, 'ask', ${standing('ask')}, 'buy', ${standing('buy')}, 'not-fitted', ${standing('not-fitted')}),
               'verdicts', json_build_object('same', ${verdict('same')}, 'drop-in', ${verdict('drop-in')}, 'with-effect', ${verdict('with-effect')}, 'ask', ${verdict('ask')}, 'refused', ${verdict('refused')}),
               'earlier', (select json_build_object('id', e.id, 'name', e.name) from revision e
                            where e.workshop_id = r.workshop_id and e.circuit_id = r.circuit_id and e.id <> r.id and e.created_at <= r.created_at order by e.created_at desc, e.id desc limit 1)
             ) as facts
        from revision r join circuit c on c.workshop_id = r.workshop_id and c.id = r.circuit_id
       where r.workshop_id = ${workshopId} and r.id = ${input.revisionId}`);
    const row = found.rows[0];
    if (!row) throw notFound('revision');
    return row.facts;
  },
});

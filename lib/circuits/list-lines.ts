/** The lines of a revision with what the shelf has for each; one statement a page. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id, instant, listOf, pageFields, pageOf } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { USES } from '@/lib/electronics/stand-in/check';
import { partFacts, partFactsJson } from '@/lib/stores/part-facts';
import { binsOf, STANDINGS, stood, VERDICTS } from './line-standing';
import { partSpecSchema } from './part-spec-schema';

const binFree = z.object({ id: id(), code: z.string(), free: z.number().int() });

const lineRow = z.object({
  id: id(),
  position: z.number().int(),
  sheet: z.string().nullable(),
  /** 1-based row in the file. */
  row: z.number().int(),
  designators: z.array(z.string()),
  /** Units one circuit needs, and the units asked about. */
  quantity: z.number().int(),
  need: z.number().int(),
  fitted: z.boolean(),
  kind: z.string(),
  text: z.string(),
  spec: partSpecSchema,
  use: z.enum(USES).nullable(),
  /** An open question hangs on it. */
  question: z.boolean(),
  verdict: z.enum(VERDICTS).nullable(),
  standing: z.enum(STANDINGS),
  /** What would be taken: decided by a person, or the best that every check passes. */
  chosen: z.object({ part: partFacts, free: z.number().int(), bins: z.array(binFree) }).nullable(),
  decision: z.object({ partId: id().nullable(), reason: z.string(), by: z.string(), at: instant() }).nullable(),
  /** The best candidate where nothing is chosen, with the first check that speaks against it or asks for a hand. */
  best: z
    .object({
      part: partFacts,
      free: z.number().int(),
      bins: z.array(binFree),
      verdict: z.enum(VERDICTS),
      deviationPercent: z.number().nullable(),
      because: z.string().nullable(),
    })
    .nullable(),
});

export const listLines = query({
  name: 'lines.list',
  http: 'GET /revisions/{revisionId}/lines',
  summary:
    'Lines of a revision with need, free stock, verdict and the part that would be taken. `units` is how many circuits are to be made.',
  roles: 'everyone',
  input: z.strictObject({
    revisionId: id(),
    ...pageFields,
    units: z.coerce.number().int().min(1).max(10_000).default(1),
    standing: listOf(z.enum(STANDINGS)).optional(),
    verdict: listOf(z.enum(VERDICTS)).optional(),
    search: z.string().trim().max(100).optional(),
  }),
  output: pageOf(lineRow),
  async run({ tx, actor, input }) {
    const { workshopId } = actor;
    const known = await tx.execute(
      sql`select 1 from revision where workshop_id = ${workshopId} and id = ${input.revisionId}`,
    );
    if (known.rows.length === 0) throw notFound('revision');
    const wanted = [
      input.standing
        ? sql`s.standing in (select jsonb_array_elements_text(${JSON.stringify(input.standing)}::jsonb))`
        : sql`true`,
      input.verdict
        ? sql`s.verdict in (select jsonb_array_elements_text(${JSON.stringify(input.verdict)}::jsonb))`
        : sql`true`,
      input.search
        ? sql`(l.text ilike ${`%${input.search.replace(/[\\%_]/g, '\\$&')}%`} or upper(${input.search}) = any(l.designators))`
        : sql`true`,
    ];
    const found = await tx.execute<{ row: z.input<typeof lineRow>; total: number }>(sql`
      with ${stood(workshopId, input.revisionId, input.units)},
      page as (
        select s.*, count(*) over ()::int as total from stood s join line l on l.workshop_id = ${workshopId} and l.id = s.id
         where ${sql.join(wanted, sql` and `)} order by s.position limit ${input.size} offset ${(input.page - 1) * input.size}
      )
      select s.total, json_build_object(
               'id', l.id, 'position', l.position, 'sheet', l.sheet, 'row', l.source_row, 'designators', l.designators, 'quantity', l.quantity, 'need', s.need,
               'fitted', l.fitted, 'kind', l.kind, 'text', l.text, 'spec', l.spec, 'use', l.use, 'question', s.question, 'verdict', s.verdict, 'standing', s.standing,
               'chosen', case when s.part_id is not null then (
                 select json_build_object('part', ${partFactsJson('p')}, 'free', s.free, 'bins', ${binsOf(sql`p.id`)}) from part p where p.workshop_id = l.workshop_id and p.id = s.part_id) end,
               'decision', case when s.decided then json_build_object('partId', s.part_id, 'reason', s.decided_reason,
                 'by', coalesce((select name from person where id = s.decided_by), ''), 'at', to_char(s.decided_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"')) end,
               'best', case when s.part_id is null and not s.decided and s.best_id is not null then (
                 select json_build_object('part', ${partFactsJson('p')}, 'free', s.free, 'bins', ${binsOf(sql`p.id`)}, 'verdict', s.best_verdict, 'deviationPercent', s.best_deviation::float8,
                          'because', (select k ->> 'why' from jsonb_array_elements(s.best_checks) k
                                       order by array_position(array['fail', 'unknown', 'note', 'pass'], k ->> 'outcome'), (k ->> 'changes')::boolean desc limit 1))
                   from part p where p.workshop_id = l.workshop_id and p.id = s.best_id) end) as row
        from page s join line l on l.workshop_id = ${workshopId} and l.id = s.id
       order by s.position`);
    return {
      rows: found.rows.map(({ row }) => row),
      total: found.rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});

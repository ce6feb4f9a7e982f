/** A count's page. While anything is still to be counted no figure leaves the database: neither the ledger's nor an earlier one. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { COUNT_ACTS, countStateAfter } from './count-states';
import { countRow, countRowJoins, countRowJson } from './list-counts';
import { partFacts, partFactsJson } from './part-facts';

const entryRow = z.object({
  id: id(),
  binId: id(),
  binCode: z.string(),
  part: partFacts,
  found: z.boolean(),
  isCounted: z.boolean(),
  attempt: z.number().int(),
  /** These three are null while the count is blind. */
  counted: z.number().int().nullable(),
  ledger: z.number().int().nullable(),
  variance: z.number().int().nullable(),
  /** Variance at the average cost of the part's lots, in the workshop's currency; null where nothing is known. */
  varianceCost: z.string().nullable(),
  countedBy: z.string().nullable(),
});
const binOfCount = z.object({
  binId: id(),
  code: z.string(),
  cabinetId: id(),
  looked: z.boolean(),
  toCount: z.number().int(),
});

export const getCount = query({
  name: 'counts.get',
  http: 'GET /counts/{countId}',
  summary: 'A count with its bins and entries in walking order; figures only once everything is counted.',
  roles: 'everyone',
  input: z.strictObject({ countId: id() }),
  output: countRow.extend({
    binList: z.array(binOfCount),
    entryList: z.array(entryRow),
    acts: z.array(z.enum(COUNT_ACTS)),
  }),
  async run({ tx, actor, input }) {
    const head = await tx.execute<{ row: z.output<typeof countRow> }>(sql`
      select ${countRowJson} as row from stock_count c ${countRowJoins} where c.workshop_id = ${actor.workshopId} and c.id = ${input.countId}`);
    const row = head.rows[0]?.row;
    if (!row) throw notFound('count');
    const blind = row.state === 'open' || row.state === 'recount';
    const figure = (expression: string) => (blind ? sql`null` : sql.raw(expression));
    const walk = sql`k.walk_order, k.code, b."column", case when b."column" % 2 = 1 then b.row else -b.row end`;
    const bins = await tx.execute<{ row: z.output<typeof binOfCount> }>(sql`
      select json_build_object('binId', b.id, 'code', b.code, 'cabinetId', k.id, 'looked', x.looked_at is not null,
               'toCount', (select count(*) from count_entry e where e.workshop_id = x.workshop_id and e.count_id = x.count_id and e.bin_id = x.bin_id and e.counted is null)) as row
        from count_bin x
        join bin b on b.workshop_id = x.workshop_id and b.id = x.bin_id
        join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
       where x.workshop_id = ${actor.workshopId} and x.count_id = ${input.countId} order by ${walk}`);
    const entries = await tx.execute<{ row: z.output<typeof entryRow> }>(sql`
      select json_build_object('id', e.id, 'binId', b.id, 'binCode', b.code, 'part', ${partFactsJson('p')}, 'found', e.found, 'isCounted', e.counted is not null, 'attempt', e.attempt,
               'counted', ${figure('e.counted')}, 'ledger', ${figure('e.ledger_at_count')}, 'variance', ${figure('e.counted - e.ledger_at_count')},
               'varianceCost', ${figure(`(select trim_scale(round((e.counted - e.ledger_at_count) * sum(t.on_hand * t.unit_cost) / nullif(sum(t.on_hand), 0), 2))::text from lot t where t.workshop_id = e.workshop_id and t.part_id = e.part_id)`)},
               'countedBy', w.name) as row
        from count_entry e
        join bin b on b.workshop_id = e.workshop_id and b.id = e.bin_id
        join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
        join part p on p.workshop_id = e.workshop_id and p.id = e.part_id
        left join person w on w.id = e.counted_by
       where e.workshop_id = ${actor.workshopId} and e.count_id = ${input.countId}
       order by ${walk}, p.name`);
    return {
      ...row,
      binList: bins.rows.map((one) => one.row),
      entryList: entries.rows.map((one) => one.row),
      acts: COUNT_ACTS.filter((act) => countStateAfter(row.state, act) !== null),
    };
  },
});

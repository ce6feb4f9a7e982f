/** One bin: where it is, what lies in it lot by lot, whether it is due, and what moved through it lately. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { movementRow, movementsPage } from './list-movements';
import { partFacts, partFactsJson } from './part-facts';

const RECENT_MOVEMENTS = 20;

const fromDatabase = z.object({
  id: id(),
  code: z.string(),
  cabinetId: id(),
  cabinet: z.string(),
  room: z.string(),
  column: z.number().int(),
  row: z.number().int(),
  capacity: z.number().int().nullable(),
  countDueSince: z.string().nullable(),
  countDueReason: z.string().nullable(),
  doubtful: z.boolean(),
  retired: z.boolean(),
  /** The count under way that it belongs to: its figures are for nobody who counts. */
  openCount: z.object({ id: id(), number: z.string() }).nullable(),
  lots: z.array(
    z.object({
      lotId: id(),
      part: partFacts,
      onHand: z.number().int(),
      reserved: z.number().int(),
      free: z.number().int(),
      receivedAt: z.string(),
      lotCode: z.string().nullable(),
      dateCode: z.string().nullable(),
    }),
  ),
});

export const getBin = query({
  name: 'bins.get',
  http: 'GET /bins/{binId}',
  summary: 'A bin with its lots and what moved through it lately.',
  roles: 'everyone',
  input: z.strictObject({ binId: id() }),
  output: fromDatabase.extend({ recent: z.array(movementRow) }),
  async run({ tx, actor, input }) {
    const found = await tx.execute<{ row: z.output<typeof fromDatabase> }>(sql`
      select json_build_object('id', b.id, 'code', b.code, 'cabinetId', k.id, 'cabinet', k.code, 'room', k.room, 'column', b."column", 'row', b.row, 'capacity', b.capacity,
               'countDueSince', to_char(b.count_due_since at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'countDueReason', b.count_due_reason, 'doubtful', b.doubtful, 'retired', b.retired_at is not null,
               'openCount', (select json_build_object('id', c.id, 'number', c.number) from count_bin x join stock_count c on c.workshop_id = x.workshop_id and c.id = x.count_id
                              where x.workshop_id = b.workshop_id and x.bin_id = b.id and c.state in ('open', 'counted', 'recount') limit 1),
               'lots', (select coalesce(json_agg(json_build_object('lotId', t.id, 'part', ${partFactsJson('p')}, 'onHand', t.on_hand, 'reserved', t.reserved, 'free', t.on_hand - t.reserved,
                          'receivedAt', to_char(t.received_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'lotCode', t.lot_code, 'dateCode', t.date_code) order by p.name, t.received_at, t.id), '[]')
                          from lot t join part p on p.workshop_id = t.workshop_id and p.id = t.part_id where t.workshop_id = b.workshop_id and t.bin_id = b.id and t.on_hand > 0)) as row
        from bin b join cabinet k on k.workshop_id = b.workshop_id and k.id = b.cabinet_id
       where b.workshop_id = ${actor.workshopId} and b.id = ${input.binId}`);
    const row = found.rows[0]?.row;
    if (!row) throw notFound('bin');
    const recent = await movementsPage(
      tx,
      [sql`m.workshop_id = ${actor.workshopId}`, sql`m.bin_id = ${input.binId}`],
      RECENT_MOVEMENTS,
    );
    return { ...row, recent };
  },
});

/** A batch as lists and its page show it. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { BATCH_STATES } from '@/lib/circuits/batch-states';

export const batchRow = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(BATCH_STATES),
  units: z.number().int(),
  circuitId: id(),
  circuit: z.string(),
  revisionId: id(),
  revision: z.string(),
  neededBy: z.string().nullable(),
  priority: z.number().int(),
  /** Lines that need something; of them those wholly promised or picked, and those wholly picked. */
  needs: z.number().int(),
  covered: z.number().int(),
  picked: z.number().int(),
  /** Stops still to be made: parts in bins. */
  stopsOpen: z.number().int(),
  createdBy: z.string(),
  createdAt: z.string(),
  version: z.number().int(),
});
export type BatchRowShown = z.output<typeof batchRow>;

/** BatchRow for batches under the alias `b`: its text and the joins it reads. */
export const batchRowJson = sql.raw(`
  json_build_object('id', b.id, 'number', b.number, 'state', b.state, 'units', b.units, 'circuitId', c.id, 'circuit', c.name, 'revisionId', v.id, 'revision', v.name,
    'neededBy', b.needed_by, 'priority', b.priority, 'createdBy', w.name, 'createdAt', to_char(b.created_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'), 'version', b.version,
    'needs', n.needs, 'covered', n.covered, 'picked', n.picked, 'stopsOpen', o.stops)`);
export const batchRowJoins = sql.raw(`
  join revision v on v.workshop_id = b.workshop_id and v.id = b.revision_id
  join circuit c on c.workshop_id = v.workshop_id and c.id = v.circuit_id
  join person w on w.id = b.created_by
  cross join lateral (
    select count(*)::int as needs, count(*) filter (where x.promised >= x.quantity)::int as covered, count(*) filter (where x.picked >= x.quantity)::int as picked
      from (select n.quantity, coalesce(sum(r.quantity - r.released), 0) as promised, coalesce(sum(r.picked), 0) as picked
              from batch_need n left join reservation r on r.workshop_id = n.workshop_id and r.need_id = n.id
             where n.workshop_id = b.workshop_id and n.batch_id = b.id group by n.id, n.quantity) x) n
  cross join lateral (
    select count(distinct (t.bin_id, t.part_id))::int as stops from reservation r join lot t on t.workshop_id = r.workshop_id and t.id = r.lot_id
     where r.workshop_id = b.workshop_id and r.batch_id = b.id and r.open > 0) o`);

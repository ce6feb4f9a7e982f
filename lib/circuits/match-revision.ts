/**
 * Matching writes the candidates of a revision's lines: lines alike (same specification and use) are weighed once, and
 * the rows are written set by set. Runs inside the command that changed something, or as a job for long lists.
 */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { type Tx, withWorkshop } from '@/db/client';
import type { PartSpec } from '@/lib/electronics/part-spec';
import { USES, type Use } from '@/lib/electronics/stand-in/check';
import type { HandledJob } from '@/lib/services/jobs';
import { findCandidates } from './find-candidates';
import { partSpecSchema } from './part-spec-schema';
import { relatedFamilies } from './related-families';

/** Kept of each line; the stand-in sheet looks afresh and shows more. */
const KEPT_A_LINE = 4;
const GROUPS_AT_ONCE = 400;

interface Group {
  readonly specKey: string;
  readonly use: Use | null;
  readonly spec: PartSpec;
  readonly needed: number;
}

const groupRow = z.object({
  spec_key: z.string(),
  use: z.enum(USES).nullable(),
  spec: partSpecSchema,
  needed: z.number(),
});

/**
 * Writes the candidates of all lines, or of the given ones and those alike, of one revision.
 * @returns how many different specifications were weighed
 */
export async function matchLines(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  lineIds: readonly string[] | null = null,
): Promise<number> {
  if (lineIds?.length === 0) return 0;
  const [found] = (
    await tx.execute<{ rails: number[] }>(sql`
      select to_json(c.rails_volts) as rails from revision r join circuit c on c.workshop_id = r.workshop_id and c.id = r.circuit_id
       where r.workshop_id = ${workshopId} and r.id = ${revisionId}`)
  ).rows;
  if (!found) return 0;
  const chosen =
    lineIds === null
      ? sql`true`
      : sql`l.id in (select jsonb_array_elements_text(${JSON.stringify(lineIds)}::jsonb)::uuid)`;
  // A line that is not fitted needs no part; its candidates would only be noise.
  const grouped = await tx.execute(sql`
    select l.spec_key, l.use, (array_agg(l.spec order by l.position))[1] as spec, max(l.quantity) as needed
      from line l where l.workshop_id = ${workshopId} and l.revision_id = ${revisionId} and l.fitted and l.quantity > 0 and ${chosen}
     group by l.spec_key, l.use order by l.spec_key`);
  await tx.execute(sql`
    delete from candidate k using line l
     where k.workshop_id = ${workshopId} and l.workshop_id = k.workshop_id and l.id = k.line_id and l.revision_id = ${revisionId}
       and ${
         lineIds === null
           ? sql`true`
           : sql`(${chosen} or (l.spec_key, coalesce(l.use, '')) in (
         select l.spec_key, coalesce(l.use, '') from line l where l.workshop_id = ${workshopId} and l.revision_id = ${revisionId} and ${chosen}))`
       }`);
  const groups = grouped.rows.map((row): Group => {
    const { spec_key: specKey, use, spec, needed } = groupRow.parse(row);
    return { specKey, use, spec, needed };
  });
  for (let from = 0; from < groups.length; from += GROUPS_AT_ONCE) {
    await writeCandidates(tx, workshopId, revisionId, found.rails, groups.slice(from, from + GROUPS_AT_ONCE));
  }
  return groups.length;
}

async function writeCandidates(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  rails: readonly number[],
  groups: readonly Group[],
): Promise<void> {
  const candidates = await findCandidates(tx, workshopId, rails, groups, KEPT_A_LINE);
  const rows = groups.flatMap((group, n) =>
    (candidates[n] ?? []).map((one, place) => ({
      spec_key: group.specKey,
      use: group.use,
      part_id: one.partId,
      rank: place + 1,
      verdict: one.verdict,
      checks: one.checks,
      deviation: one.deviationPercent,
    })),
  );
  if (rows.length === 0) return;
  await tx.execute(sql`
    insert into candidate (workshop_id, line_id, part_id, rank, verdict, checks, deviation_percent)
    select l.workshop_id, l.id, k.part_id, k.rank, k.verdict, k.checks, k.deviation
      from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as k(spec_key text, use text, part_id uuid, rank int, verdict text, checks jsonb, deviation numeric)
      join line l on l.workshop_id = ${workshopId} and l.revision_id = ${revisionId} and l.spec_key = k.spec_key and l.use is not distinct from k.use
     where l.fitted and l.quantity > 0`);
}

const revisionPayload = z.object({ revisionId: z.uuid() });

export async function matchRevision({ workshopId, payload }: HandledJob): Promise<void> {
  const { revisionId } = revisionPayload.parse(payload);
  await withWorkshop(workshopId, (tx) => matchLines(tx, workshopId, revisionId));
}

const partsPayload = z.object({ partIds: z.array(z.uuid()).max(1_000) });

/** Parts came, went or changed: only lines that they could answer, of revisions that somebody still works with, are weighed again. */
export async function matchStockChanged({ workshopId, payload }: HandledJob): Promise<void> {
  const { partIds } = partsPayload.parse(payload);
  await withWorkshop(workshopId, async (tx) => {
    const changed = await tx.execute<{ id: string; family: string | null }>(sql`
      select id, family from part where workshop_id = ${workshopId} and id in (select jsonb_array_elements_text(${JSON.stringify(partIds)}::jsonb)::uuid)`);
    if (changed.rows.length === 0) return;
    const parts = changed.rows.map(({ id, family }) => ({
      id,
      families: family === null ? [] : [...relatedFamilies(family), family],
    }));
    const touched = await tx.execute<{ revision_id: string; lines: string[] }>(sql`
      select l.revision_id, json_agg(distinct l.id) as lines
        from jsonb_to_recordset(${JSON.stringify(parts)}::jsonb) as a(id uuid, families text[])
        join part p on p.workshop_id = ${workshopId} and p.id = a.id
        join line l on l.workshop_id = p.workshop_id
         and (l.family = any(a.families)
              or upper(regexp_replace(l.part_number, '[^A-Za-z0-9]', '', 'g')) = p.part_key
              or (l.kind = p.kind and ((l.unit = p.unit and p.value between l.value / 2.2 and l.value * 2.2) or (l.value is null and l.family is null and l.part_number is null)))
              or exists (select 1 from candidate k where k.workshop_id = l.workshop_id and k.line_id = l.id and k.part_id = p.id))
        join revision r on r.workshop_id = l.workshop_id and r.id = l.revision_id
       where l.fitted and l.quantity > 0
         and (r.state = 'draft'
              or exists (select 1 from batch b where b.workshop_id = r.workshop_id and b.revision_id = r.id and b.state not in ('finished', 'cancelled'))
              or not exists (select 1 from revision n where n.workshop_id = r.workshop_id and n.circuit_id = r.circuit_id and n.created_at > r.created_at))
       group by l.revision_id order by l.revision_id`);
    for (const { revision_id: revisionId, lines } of touched.rows) await matchLines(tx, workshopId, revisionId, lines);
  });
}

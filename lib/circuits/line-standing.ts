/**
 * Where each line of a revision stands: what was chosen for it (a person's newest decision, else the best candidate that
 * every check passes), what the shelf has of that, and so whether it can be taken, asks, or must be bought. One SQL
 * fragment, used by the list of lines and by the revision's figures, so that they never disagree.
 */
import 'server-only';
import { sql } from 'drizzle-orm';

export const STANDINGS = ['shelf', 'effect', 'ask', 'buy', 'not-fitted'] as const;
export const VERDICTS = ['same', 'drop-in', 'with-effect', 'ask', 'refused'] as const;

/**
 * Gives `with … stood as (…)`: a row a line with `part_id`, `verdict`, `decided`, `need`, `free`, `standing`, `best_id`.
 * Lines that share a part share its stock, in the order of the list.
 */
export const stood = (workshopId: string, revisionId: string, units: number) => sql`
  chosen as materialized (
    select l.id, l.position, l.fitted, l.quantity * ${units}::bigint as need,
           exists (select 1 from question q where q.workshop_id = l.workshop_id and q.line_id = l.id and q.answered_at is null) as question,
           d.id as decision_id, d.reason as decided_reason, d.decided_at, d.decided_by,
           b.part_id as best_id, b.verdict as best_verdict, b.checks as best_checks, b.deviation_percent as best_deviation,
           case when d.id is not null then d.part_id else a.part_id end as part_id,
           case when d.id is not null then case when d.part_id is not null then d.verdict end else coalesce(a.verdict, b.verdict) end as verdict
      from line l
      left join lateral (select id, part_id, verdict, reason, decided_at, decided_by from decision
                          where workshop_id = l.workshop_id and line_id = l.id order by decided_at desc, id desc limit 1) d on true
      left join lateral (select c.part_id, c.verdict from candidate c join part p on p.workshop_id = c.workshop_id and p.id = c.part_id and p.retired_at is null
                          where c.workshop_id = l.workshop_id and c.line_id = l.id and c.verdict in ('same', 'drop-in') order by c.rank limit 1) a on true
      left join lateral (select c.part_id, c.verdict, c.checks, c.deviation_percent from candidate c join part p on p.workshop_id = c.workshop_id and p.id = c.part_id and p.retired_at is null
                          where c.workshop_id = l.workshop_id and c.line_id = l.id order by c.rank limit 1) b on true
     where l.workshop_id = ${workshopId} and l.revision_id = ${revisionId}
  ), shelf as materialized (
    select t.part_id, sum(t.on_hand - t.reserved)::bigint as free from lot t
     where t.workshop_id = ${workshopId} and t.part_id in (select coalesce(part_id, best_id) from chosen) and t.on_hand > t.reserved
     group by t.part_id
  ), stood as (
    select c.*, c.decision_id is not null as decided, coalesce(s.free, 0) as free,
           case
             when not c.fitted or c.need = 0 then 'not-fitted'
             when c.question then 'ask'
             when (c.decision_id is not null and c.part_id is null) or c.verdict is null or (c.verdict = 'refused' and c.part_id is null) then 'buy'
             when c.verdict = 'ask' and c.decision_id is null then 'ask'
             when coalesce(s.free, 0) < sum(case when c.fitted then c.need else 0 end) over (partition by coalesce(c.part_id, c.best_id) order by c.position) then 'buy'
             when c.verdict = 'with-effect' then 'effect'
             else 'shelf'
           end as standing
      from chosen c left join shelf s on s.part_id = coalesce(c.part_id, c.best_id)
  )`;

/** Bins that hold free units of the part, fullest first, at most four. */
export const binsOf = (partId: ReturnType<typeof sql>) => sql`coalesce((
  select json_agg(json_build_object('id', x.id, 'code', x.code, 'free', x.free) order by x.free desc, x.code)
    from (select n.id, n.code, sum(t.on_hand - t.reserved)::int as free
            from lot t join bin n on n.workshop_id = t.workshop_id and n.id = t.bin_id
           where t.workshop_id = l.workshop_id and t.part_id = ${partId} and t.on_hand > t.reserved
           group by n.id, n.code order by 3 desc, 2 limit 4) x), '[]'::json)`;

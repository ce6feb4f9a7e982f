/** The stand-in sheet of a line: what is asked for, every part that comes into question with its checks, what was decided. Always weighed afresh. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id, instant } from '@/lib/api/fields';
import { query } from '@/lib/api/use-case';
import { partFacts, partFactsJson } from '@/lib/stores/part-facts';
import { type Candidate, findCandidates } from './find-candidates';
import { lineInView, type LineInView, lookAtLine } from './line-in-view';
import { binsOf, VERDICTS } from './line-standing';
import { preferredNear, preferredValuesNear } from './preferred-near';

const MOST_SHOWN = 24;

export const checkFields = z.object({
  check: z.string(),
  wanted: z.string(),
  offered: z.string(),
  outcome: z.enum(['pass', 'note', 'fail', 'unknown']),
  why: z.string(),
  changes: z.boolean(),
});

export const candidateFields = z.object({
  part: partFacts,
  /** Units that nobody has reserved, and where they are. */
  free: z.number().int(),
  bins: z.array(z.object({ id: id(), code: z.string(), free: z.number().int() })),
  verdict: z.enum(VERDICTS),
  checks: z.array(checkFields),
  deviationPercent: z.number().nullable(),
  /** Somebody took it for a line alike before. */
  remembered: z.boolean(),
});

export const decisionFields = z.object({
  partId: id().nullable(),
  partName: z.string().nullable(),
  verdict: z.string(),
  reason: z.string(),
  by: z.string(),
  at: instant(),
});

const sheet = z.object({
  line: lineInView,
  candidates: z.array(candidateFields),
  /** The best that may be taken and is on the shelf: what to propose beside a refused one. */
  insteadPartId: id().nullable(),
  /** What the value rounds to in each preferred series, and which of those are on the shelf. */
  preferred: z.array(preferredNear),
  /** Of this line, newest first; the newest holds. */
  decisions: z.array(decisionFields),
  /** The newest decision on a line alike, with the circuit it was made for. */
  remembered: decisionFields.extend({ circuitName: z.string(), revisionName: z.string() }).nullable(),
});

export const lineCandidates = query({
  name: 'lines.candidates',
  http: 'GET /lines/{lineId}/candidates',
  summary:
    'Everything on the shelf that comes into question for a line, each with all checks and their reasons, best first.',
  roles: 'everyone',
  input: z.strictObject({ lineId: id() }),
  output: sheet,
  async run({ tx, actor, input }) {
    const line = await lookAtLine(tx, actor.workshopId, input.lineId);
    const [found = []] = await findCandidates(
      tx,
      actor.workshopId,
      line.railsVolts,
      [{ spec: line.spec, use: line.use, needed: line.quantity }],
      MOST_SHOWN,
    );
    const candidates = await describeCandidates(tx, actor.workshopId, found);
    const instead =
      candidates.find((one) => one.verdict !== 'refused' && one.verdict !== 'ask' && one.free > 0) ??
      candidates.find((one) => one.verdict === 'ask' && one.free > 0);
    return {
      line,
      candidates,
      insteadPartId: instead?.part.id ?? null,
      preferred: preferredValuesNear(line.spec, candidates),
      decisions: await decisionsOf(tx, actor.workshopId, line.id),
      remembered: await rememberedFor(tx, actor.workshopId, line),
    };
  },
});

export async function describeCandidates(
  tx: Tx,
  workshopId: string,
  found: readonly Candidate[],
): Promise<z.input<typeof candidateFields>[]> {
  const shown = await tx.execute<{
    id: string;
    part: z.input<typeof partFacts>;
    bins: z.input<typeof candidateFields>['bins'];
  }>(sql`
    select p.id, ${partFactsJson('p')} as part, ${binsOf(sql`p.id`)} as bins
      from part p join lateral (select p.workshop_id) l on true
     where p.workshop_id = ${workshopId} and p.id in (select jsonb_array_elements_text(${JSON.stringify(found.map((one) => one.partId))}::jsonb)::uuid)`);
  const byId = new Map(shown.rows.map((row) => [row.id, row]));
  return found.flatMap((one) => {
    const row = byId.get(one.partId);
    return row
      ? [
          {
            part: row.part,
            free: one.free,
            bins: row.bins,
            verdict: one.verdict,
            checks: [...one.checks],
            deviationPercent: one.deviationPercent,
            remembered: one.remembered,
          },
        ]
      : [];
  });
}

const decisionJson = sql`json_build_object('partId', d.part_id, 'partName', p.name, 'verdict', d.verdict, 'reason', d.reason, 'by', coalesce((select name from person where id = d.decided_by), ''),
  'at', to_char(d.decided_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"'))`;

async function decisionsOf(tx: Tx, workshopId: string, lineId: string): Promise<z.input<typeof decisionFields>[]> {
  const found = await tx.execute<{ decision: z.input<typeof decisionFields> }>(sql`
    select ${decisionJson} as decision from decision d left join part p on p.workshop_id = d.workshop_id and p.id = d.part_id
     where d.workshop_id = ${workshopId} and d.line_id = ${lineId} order by d.decided_at desc, d.id desc limit 50`);
  return found.rows.map((row) => row.decision);
}

async function rememberedFor(
  tx: Tx,
  workshopId: string,
  line: LineInView,
): Promise<z.input<typeof sheet>['remembered']> {
  const found = await tx.execute<{
    decision: z.input<typeof decisionFields>;
    circuitName: string;
    revisionName: string;
  }>(sql`
    select ${decisionJson} as decision, c.name as "circuitName", r.name as "revisionName"
      from decision d
      left join part p on p.workshop_id = d.workshop_id and p.id = d.part_id
      join line l on l.workshop_id = d.workshop_id and l.id = d.line_id
      join revision r on r.workshop_id = l.workshop_id and r.id = l.revision_id
      join circuit c on c.workshop_id = r.workshop_id and c.id = r.circuit_id
     where d.workshop_id = ${workshopId} and d.spec_key = ${line.specKey} and d.line_id <> ${line.id}
     order by d.decided_at desc, d.id desc limit 1`);
  const row = found.rows[0];
  return row ? { ...row.decision, circuitName: row.circuitName, revisionName: row.revisionName } : null;
}

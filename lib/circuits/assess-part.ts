/** Any part of the workshop laid beside a line, weighed on the spot. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { type Candidate, findCandidates } from './find-candidates';
import { candidateFields, describeCandidates } from './line-candidates';
import { type LineInView, lookAtLine } from './line-in-view';

export const assessPart = query({
  name: 'lines.assess',
  http: 'POST /lines/{lineId}/assess',
  summary: 'May this part stand in on this line? Every check with its reason; changes nothing.',
  roles: 'everyone',
  input: z.strictObject({ lineId: id(), partId: id() }),
  output: candidateFields,
  async run({ tx, actor, input }) {
    const line = await lookAtLine(tx, actor.workshopId, input.lineId);
    const [shown] = await describeCandidates(tx, actor.workshopId, [
      await weighOne(tx, actor.workshopId, line, input.partId),
    ]);
    if (!shown) throw notFound('part');
    return shown;
  },
});

/** Throws Refusal `not-found` for a part that is not here or retired. */
export async function weighOne(tx: Tx, workshopId: string, line: LineInView, partId: string): Promise<Candidate> {
  const known = await tx.execute(
    sql`select 1 from part where workshop_id = ${workshopId} and id = ${partId} and retired_at is null`,
  );
  if (known.rows.length === 0) throw notFound('part');
  const asked = { spec: line.spec, use: line.use, needed: line.quantity, partIds: [partId] };
  const [found = []] = await findCandidates(tx, workshopId, line.railsVolts, [asked], Number.MAX_SAFE_INTEGER);
  const one = found.find((candidate) => candidate.partId === partId);
  if (!one) throw notFound('part');
  return one;
}

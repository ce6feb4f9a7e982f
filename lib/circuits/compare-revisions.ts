/** What changed between two revisions. */
import 'server-only';
import { and, asc, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { line, revision } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { compareByDesignator, compareByPart, type ComparedLine } from './compare-lines';

const comparedLine = z.object({
  designators: z.array(z.string()),
  quantity: z.number().int(),
  fitted: z.boolean(),
  text: z.string(),
  specKey: z.string(),
});
const named = z.object({ id: id(), name: z.string(), circuitId: id() });

export const compareRevisions = query({
  name: 'revisions.compare',
  http: 'GET /revisions/{revisionId}/compare',
  summary:
    'What changed from revision `with` to this one: added, gone, other part, other quantity, by designator and by part.',
  roles: 'everyone',
  input: z.strictObject({ revisionId: id(), with: id() }),
  output: z.object({
    before: named,
    after: named,
    byDesignator: z.array(
      z.object({
        change: z.enum(['added', 'gone', 'part', 'quantity', 'fitted']),
        designators: z.array(z.string()),
        before: comparedLine.nullable(),
        after: comparedLine.nullable(),
      }),
    ),
    byPart: z.array(z.object({ text: z.string(), before: z.number().int(), after: z.number().int() })),
  }),
  async run({ tx, actor, input }) {
    const [before, after] = [
      await linesOf(tx, actor.workshopId, input.with),
      await linesOf(tx, actor.workshopId, input.revisionId),
    ];
    const open = (one: ComparedLine | null) => one && { ...one, designators: [...one.designators] };
    return {
      before: before.revision,
      after: after.revision,
      byDesignator: compareByDesignator(before.lines, after.lines).map((one) => ({
        change: one.change,
        designators: [...one.designators],
        before: open(one.before),
        after: open(one.after),
      })),
      byPart: compareByPart(before.lines, after.lines).map((one) => ({ ...one })),
    };
  },
});

async function linesOf(tx: Tx, workshopId: string, revisionId: string) {
  const [of] = await tx
    .select({ id: revision.id, name: revision.name, circuitId: revision.circuitId })
    .from(revision)
    .where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)));
  if (!of) throw notFound('revision');
  const lines: ComparedLine[] = await tx
    .select({
      designators: line.designators,
      quantity: line.quantity,
      fitted: line.fitted,
      text: line.text,
      specKey: line.specKey,
    })
    .from(line)
    .where(and(eq(line.workshopId, workshopId), eq(line.revisionId, revisionId)))
    .orderBy(asc(line.position));
  return { revision: of, lines };
}

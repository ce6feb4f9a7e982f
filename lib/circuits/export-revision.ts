/** A revision as a CSV that a spreadsheet opens safely and our own reader reads back. */
import 'server-only';
import { and, asc, eq } from 'drizzle-orm';
import { z } from 'zod';
import { circuit, line, revision } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { linesCsv } from './lines-csv';
import { attachment } from './upload-bytes';

export const exportRevision = query({
  name: 'revisions.export',
  http: 'GET /revisions/{revisionId}/export',
  summary: 'The lines as CSV (UTF-8, comma, CRLF).',
  roles: 'everyone',
  input: z.strictObject({ revisionId: id() }),
  output: z.instanceof(Response),
  async run({ tx, actor, input }) {
    const [of] = await tx
      .select({ name: revision.name, circuitName: circuit.name })
      .from(revision)
      .innerJoin(circuit, and(eq(circuit.workshopId, revision.workshopId), eq(circuit.id, revision.circuitId)))
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, input.revisionId)));
    if (!of) throw notFound('revision');
    const lines = await tx
      .select({
        designators: line.designators,
        quantity: line.quantity,
        kind: line.kind,
        text: line.text,
        fitted: line.fitted,
        use: line.use,
      })
      .from(line)
      .where(and(eq(line.workshopId, actor.workshopId), eq(line.revisionId, input.revisionId)))
      .orderBy(asc(line.position));
    return attachment(linesCsv(lines), `${of.circuitName} ${of.name}.csv`, 'text/csv; charset=utf-8');
  },
});

/** A row that was taken for a part and is none: the line goes, the row stays in the reading as no part. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { candidate, decision, line, question, revision } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';
import { keptReading } from './kept-reading';
import { lockDraft, lockLine, touchRevision } from './locked-revision';

export const dropLine = command({
  name: 'lines.drop',
  http: 'DELETE /lines/{lineId}',
  summary: 'Say that a row of a draft is no part.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ lineId: id() }),
  output: z.object({ revisionId: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { revision: of, line: gone } = await lockLine(tx, actor.workshopId, input.lineId);
    const draft = await lockDraft(tx, actor.workshopId, of.id);
    await removeLine(tx, actor.workshopId, gone.id);
    const kept = keptReading.parse(draft.reading);
    const reading = {
      ...kept,
      notLineCount: kept.notLineCount + 1,
      notLines: [
        ...kept.notLines,
        { row: gone.sourceRow, sheet: gone.sheet, why: 'taken out by hand', text: gone.text },
      ],
    };
    await tx
      .update(revision)
      .set({ reading })
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, draft.id)));
    record(gone.id, { revisionId: draft.id, row: gone.sourceRow, text: gone.text });
    return { revisionId: draft.id, version: await touchRevision(tx, draft) };
  },
});

/** With everything that hangs on it; its questions go too. */
export async function removeLine(tx: Tx, workshopId: string, lineId: string): Promise<void> {
  await tx.delete(candidate).where(and(eq(candidate.workshopId, workshopId), eq(candidate.lineId, lineId)));
  await tx.delete(decision).where(and(eq(decision.workshopId, workshopId), eq(decision.lineId, lineId)));
  await tx.delete(question).where(and(eq(question.workshopId, workshopId), eq(question.lineId, lineId)));
  await tx.delete(line).where(and(eq(line.workshopId, workshopId), eq(line.id, lineId)));
}

/** Every line, candidate, decision and question of a draft, before it is read again. */
export async function removeLines(tx: Tx, workshopId: string, revisionId: string): Promise<void> {
  const lines = sql`(select id from line where workshop_id = ${workshopId} and revision_id = ${revisionId})`;
  await tx.execute(sql`delete from candidate where workshop_id = ${workshopId} and line_id in ${lines}`);
  await tx.execute(sql`delete from decision where workshop_id = ${workshopId} and line_id in ${lines}`);
  await tx.execute(sql`delete from question where workshop_id = ${workshopId} and revision_id = ${revisionId}`);
  await tx.execute(sql`delete from line where workshop_id = ${workshopId} and revision_id = ${revisionId}`);
}

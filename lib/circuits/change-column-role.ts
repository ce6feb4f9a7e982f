/**
 * A column was taken for the wrong thing: the kept original is read again with the corrected roles. Answers and decisions
 * on rows that read the same stay; corrections of single lines are made again by hand, and the answer says how many went.
 */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { decision, upload } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { errand } from '@/lib/api/use-case';
import { COLUMN_ROLES } from '@/lib/parts-list/read-parts-list';
import { removeLines } from './drop-line';
import { keptReading } from './kept-reading';
import { lockDraft, touchRevision } from './locked-revision';
import { readList, refusalOfList } from './read-list';
import { questionPlace } from './settle-questions';
import { bytesOf } from './upload-bytes';
import { writeRevision } from './write-revision';

export const changeColumnRole = errand({
  name: 'revisions.change-column',
  http: 'POST /revisions/{revisionId}/columns',
  summary: 'Say what a column of the list is; the original is read again with that. Drafts only.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    revisionId: id(),
    version: z.number().int().optional(),
    sheet: z.string().max(200).nullable().default(null),
    index: z.number().int().min(0).max(1_024),
    role: z.enum(COLUMN_ROLES),
  }),
  output: z.object({
    revisionId: id(),
    version: z.number().int(),
    lines: z.number().int(),
    notLines: z.number().int(),
    openQuestions: z.number().int(),
  }),
  async run({ actor, input, step }) {
    const { workshopId } = actor;
    const before = await step(async ({ tx, record }) => {
      const draft = await lockDraft(tx, workshopId, input.revisionId, input.version);
      const [original] =
        draft.uploadId === null
          ? []
          : await tx
              .select()
              .from(upload)
              .where(and(eq(upload.workshopId, workshopId), eq(upload.id, draft.uploadId)));
      if (!original) throw notFound('original of this revision');
      record(draft.id, { sheet: input.sheet, column: input.index, role: input.role });
      const { columnRoles } = keptReading.parse(draft.reading);
      const others = columnRoles.filter((one) => one.sheet !== input.sheet || one.index !== input.index);
      return {
        original,
        version: draft.version,
        columnRoles: [...others, { sheet: input.sheet, index: input.index, role: input.role }],
      };
    });
    const read = await readList(await bytesOf(before.original), {
      fileName: before.original.fileName,
      columnRoles: before.columnRoles,
    });
    if (!read.ok) throw refusalOfList(read.problem, before.original);
    return step(async ({ tx, record }) => {
      const draft = await lockDraft(tx, workshopId, input.revisionId, before.version);
      const earlier = await answersSoFar(tx, workshopId, draft.id);
      const decided = await decisionsSoFar(tx, workshopId, draft.id);
      await removeLines(tx, workshopId, draft.id);
      const written = await writeRevision(tx, {
        workshopId,
        revisionId: draft.id,
        uploadId: before.original.id,
        list: read.list,
        freezeBy: null,
        earlier,
        again: true,
      });
      await bringDecisionsBack(tx, workshopId, draft.id, decided);
      record(draft.id, { lines: written.lines, openQuestions: written.openQuestions });
      return {
        revisionId: draft.id,
        version: await touchRevision(tx, draft),
        lines: written.lines,
        notLines: written.notLines,
        openQuestions: written.openQuestions,
      };
    });
  },
});

async function answersSoFar(tx: Tx, workshopId: string, revisionId: string): Promise<Map<string, string>> {
  const answered = await tx.execute<{ sheet: string | null; source_row: number; code: string; answer: string }>(sql`
    select sheet, source_row, code, answer from question where workshop_id = ${workshopId} and revision_id = ${revisionId} and answered_at is not null`);
  return new Map(
    answered.rows.map((one) => [
      questionPlace({ sheet: one.sheet, sourceRow: one.source_row, code: one.code }),
      one.answer,
    ]),
  );
}

interface Decided extends Record<string, unknown> {
  readonly sheet: string | null;
  readonly source_row: number;
  readonly line_key: string;
  readonly part_id: string | null;
  readonly verdict: string;
  readonly reason: string;
  readonly spec_key: string;
  readonly decided_by: string;
  readonly decided_at: string;
}

async function decisionsSoFar(tx: Tx, workshopId: string, revisionId: string): Promise<Decided[]> {
  const found = await tx.execute<Decided>(sql`
    select l.sheet, l.source_row, l.spec_key as line_key, d.part_id, d.verdict, d.reason, d.spec_key, d.decided_by, d.decided_at::text
      from decision d join line l on l.workshop_id = d.workshop_id and l.id = d.line_id
     where l.workshop_id = ${workshopId} and l.revision_id = ${revisionId}`);
  return found.rows;
}

/** Only onto lines that still ask for what was decided on. */
async function bringDecisionsBack(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  decided: readonly Decided[],
): Promise<void> {
  for (const one of decided) {
    const lines = await tx.execute<{ id: string }>(sql`
      select id from line where workshop_id = ${workshopId} and revision_id = ${revisionId} and source_row = ${one.source_row} and sheet is not distinct from ${one.sheet}::text and spec_key = ${one.line_key}`);
    for (const { id: lineId } of lines.rows) {
      await tx.insert(decision).values({
        workshopId,
        lineId,
        partId: one.part_id,
        verdict: one.verdict,
        reason: one.reason,
        specKey: one.spec_key,
        decidedBy: one.decided_by,
        decidedAt: new Date(one.decided_at),
      });
    }
  }
}

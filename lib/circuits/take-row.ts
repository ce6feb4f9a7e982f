/** A row that was passed over and is a part: it becomes a line, from its cells or as the person says. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { newId } from '@/db/schema/new-id';
import { revision } from '@/db/schema/circuits';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';
import { designatorFields, quantityField } from './change-line';
import { keptReading } from './kept-reading';
import { lineRowOf } from './line-draft';
import { circuitUseIn } from './line-use';
import { lockDraft, touchRevision } from './locked-revision';
import { matchLines } from './match-revision';
import { insertLines } from './store-lines';

export const takeRowAsLine = command({
  name: 'revisions.take-row',
  http: 'POST /revisions/{revisionId}/rows',
  summary: 'Take a row of the list as a part after all.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    revisionId: id(),
    version: z.number().int().optional(),
    sheet: z.string().max(200).nullable().default(null),
    row: z.number().int().min(1),
    designators: designatorFields().default([]),
    quantity: quantityField().optional(),
    /** The row's own text where not given. */
    text: words(500).optional(),
    kind: z.enum(PART_KINDS).optional(),
  }),
  output: z.object({ id: id(), revisionId: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const draft = await lockDraft(tx, actor.workshopId, input.revisionId, input.version);
    const kept = keptReading.parse(draft.reading);
    const passed = kept.notLines.find((one) => one.row === input.row && one.sheet === input.sheet);
    if (!passed) throw notFound('row that is no part');
    const text = input.text ?? passed.text.trim();
    if (text === '')
      throw new Refusal('input.invalid', `Row ${input.row} is empty: say what part it stands for.`, {
        errors: [{ pointer: '/text', code: 'too_small', detail: 'is empty' }],
      });
    const spec = readPartText(text, { kind: input.kind ?? null });
    const last = await tx.execute<{ position: number }>(
      sql`select coalesce(max(position), 0) as position from line where workshop_id = ${actor.workshopId} and revision_id = ${draft.id}`,
    );
    const lineId = newId();
    const quantity = input.quantity ?? Math.max(1, input.designators.length);
    await insertLines(tx, actor.workshopId, draft.id, [
      lineRowOf(
        {
          sheet: input.sheet,
          sourceRow: input.row,
          designators: input.designators,
          quantity,
          spec: { ...spec, doubts: [] },
          use: circuitUseIn(text),
        },
        lineId,
        (last.rows[0]?.position ?? 0) + 1,
      ),
    ]);
    await tx
      .update(revision)
      .set({
        reading: {
          ...kept,
          notLineCount: Math.max(0, kept.notLineCount - 1),
          notLines: kept.notLines.filter((one) => one !== passed),
        },
      })
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, draft.id)));
    await matchLines(tx, actor.workshopId, draft.id, [lineId]);
    record(lineId, { revisionId: draft.id, row: input.row, text });
    return { id: lineId, revisionId: draft.id, version: await touchRevision(tx, draft) };
  },
});

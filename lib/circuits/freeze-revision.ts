/** A settled draft becomes a revision that never changes again. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { revision } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { listQuestions } from './list-questions';
import { lockDraft } from './locked-revision';
import { settleUpload } from './move-upload';

const MOST_NAMED = 50;

export const freezeRevision = command({
  name: 'revisions.freeze',
  http: 'POST /revisions/{revisionId}/freeze',
  summary: 'Freeze a revision whose questions are all answered.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ revisionId: id(), version: z.number().int().optional() }),
  output: z.object({ id: id(), name: z.string(), state: z.literal('frozen'), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const draft = await lockDraft(tx, actor.workshopId, input.revisionId, input.version);
    const open = await listQuestions(tx, actor.workshopId, draft.id, MOST_NAMED);
    const [first] = open;
    if (first) {
      const count =
        open.length === MOST_NAMED
          ? `${MOST_NAMED} or more questions are`
          : open.length === 1
            ? 'One question is'
            : `${open.length} questions are`;
      throw new Refusal(
        'list.unsettled',
        `${count} open in revision ${draft.name}, the first at ${placeOf(first)}: ${first.ask} Answer first; nothing was changed.`,
        {
          errors: open.map((one) => ({
            pointer: placeOf(one),
            code: one.code,
            detail: one.ask,
          })),
          more: { questions: open },
        },
      );
    }
    const lines = await tx.execute(
      sql`select 1 from line where workshop_id = ${actor.workshopId} and revision_id = ${draft.id} limit 1`,
    );
    if (lines.rows.length === 0)
      throw new Refusal('list.unsettled', `Revision ${draft.name} has no line left to freeze.`);
    const [made] = await tx
      .update(revision)
      .set({ state: 'frozen', frozenAt: sql`now()`, frozenBy: actor.personId, version: sql`${revision.version} + 1` })
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, draft.id)))
      .returning({ version: revision.version });
    if (!made) throw new Error('a locked revision is gone');
    if (draft.uploadId !== null) await settleUpload(tx, actor.workshopId, draft.uploadId, ['freeze']);
    record(draft.id, { name: draft.name });
    return { id: draft.id, name: draft.name, state: 'frozen' as const, version: made.version };
  },
});

function placeOf({ sheet, row }: { readonly sheet: string | null; readonly row: number }): string {
  return `${sheet === null ? '' : `sheet ${sheet}, `}row ${row}`;
}

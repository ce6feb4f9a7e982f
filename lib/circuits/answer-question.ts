/** An answer to a doubt of the reader, applied to its line, and where asked remembered for the workshop. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { line, question } from '@/db/schema/circuits';
import { workshop } from '@/db/schema/people';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { applyAnswer } from './apply-answer';
import { removeLine } from './drop-line';
import { lockDraft, touchRevision } from './locked-revision';
import { settleUpload } from './move-upload';
import { matchLines } from './match-revision';
import { lineFactsOf, partSpecSchema } from './part-spec-schema';

type QuestionRow = typeof question.$inferSelect;

export const answerQuestion = command({
  name: 'questions.answer',
  http: 'POST /questions/{questionId}/answer',
  summary:
    'Answer a question about a row with one of its options or in your own words. `alike` answers all open ones that ask the same; `remember` keeps it for the workshop (taper letters).',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    questionId: id(),
    /** An option as offered, or a text of one's own. */
    answer: words(500),
    alike: z.boolean().default(false),
    remember: z.boolean().default(false),
  }),
  output: z.object({
    revisionId: id(),
    version: z.number().int(),
    answered: z.number().int(),
    openQuestions: z.number().int(),
  }),
  async run({ tx, actor, input, record }) {
    const { workshopId } = actor;
    const [seen] = await tx
      .select({ revisionId: question.revisionId })
      .from(question)
      .where(and(eq(question.workshopId, workshopId), eq(question.id, input.questionId)));
    if (!seen) throw notFound('question');
    const draft = await lockDraft(tx, workshopId, seen.revisionId);
    const open = await tx
      .select()
      .from(question)
      .where(and(eq(question.workshopId, workshopId), eq(question.revisionId, draft.id), sql`answered_at is null`));
    const asked = open.find((one) => one.id === input.questionId);
    if (!asked)
      throw new Refusal(
        'state.refused',
        'That question is answered already. Change the line itself where the answer was wrong.',
      );
    const answering = input.alike
      ? open.filter((one) => one.code === asked.code && one.options.join('\n') === asked.options.join('\n'))
      : [asked];
    const changed: string[] = [];
    for (const one of answering) changed.push(...(await answerOne(tx, workshopId, actor.personId, one, input.answer)));
    if (input.remember) await rememberAnswer(tx, workshopId, asked, input.answer);
    await matchLines(tx, workshopId, draft.id, changed);
    record(asked.id, {
      revisionId: draft.id,
      code: asked.code,
      answer: input.answer,
      answered: answering.length,
      remember: input.remember,
    });
    const left = await tx.execute<{ open: number }>(
      sql`select count(*)::int as open from question where workshop_id = ${workshopId} and revision_id = ${draft.id} and answered_at is null`,
    );
    const openQuestions = left.rows[0]?.open ?? 0;
    if (openQuestions === 0 && draft.uploadId !== null) await settleUpload(tx, workshopId, draft.uploadId, []);
    return { revisionId: draft.id, version: await touchRevision(tx, draft), answered: answering.length, openQuestions };
  },
});

/** @returns the line that changed, if one did */
async function answerOne(
  tx: Tx,
  workshopId: string,
  personId: string,
  asked: QuestionRow,
  answer: string,
): Promise<string[]> {
  const lineId = asked.lineId;
  const close = () =>
    tx
      .update(question)
      .set({ answer, answeredBy: personId, answeredAt: sql`now()` })
      .where(and(eq(question.workshopId, workshopId), eq(question.id, asked.id)));
  // A question about a row without a line: the answer is kept, the row may be taken as a line by hand.
  if (lineId === null) {
    await close();
    return [];
  }
  const own = and(eq(line.workshopId, workshopId), eq(line.id, lineId));
  const [before] = await tx.select().from(line).where(own).for('update');
  if (!before) throw notFound('line');
  const applied = applyAnswer(
    { quantity: before.quantity, spec: partSpecSchema.parse(before.spec) },
    asked.code,
    answer,
  );
  if (!applied.ok)
    throw new Refusal('input.invalid', `${applied.why} Nothing was changed.`, {
      errors: [{ pointer: '/answer', code: asked.code, detail: applied.why }],
      more: { options: asked.options },
    });
  if (!applied.line.isPart) {
    await removeLine(tx, workshopId, lineId);
    return [];
  }
  await tx
    .update(line)
    .set({ quantity: applied.line.quantity, fitted: applied.line.spec.fitted, ...lineFactsOf(applied.line.spec) })
    .where(own);
  await close();
  return [lineId];
}

async function rememberAnswer(
  tx: Tx,
  workshopId: string,
  { code, options }: QuestionRow,
  answer: string,
): Promise<void> {
  if (code !== 'taper-convention')
    throw new Refusal(
      'input.invalid',
      'Only the meaning of a taper letter is remembered for the workshop. Answer this one for its line. Nothing was changed.',
    );
  const place = options.indexOf(answer);
  if (place < 0)
    throw new Refusal(
      'input.invalid',
      `To be remembered, the answer must be ${options.join(' or ')}. Nothing was changed.`,
    );
  await tx
    .update(workshop)
    .set({ taperConvention: place === 0 ? 'letters' : 'old-european' })
    .where(eq(workshop.id, workshopId));
}

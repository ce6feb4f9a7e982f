/** Corrects what was understood of a line. A draft's line may change in anything; a frozen one only in what it is used for. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { line, question } from '@/db/schema/circuits';
import { id, words } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { PART_KINDS, type PartSpec } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';
import { USES } from '@/lib/electronics/stand-in/check';
import { MOST_DESIGNATORS, MOST_QUANTITY } from './line-draft';
import { lockDraft, lockLine, touchRevision } from './locked-revision';
import { matchLines } from './match-revision';
import { lineFactsOf, partSpecSchema } from './part-spec-schema';

export const designatorFields = () => z.array(words(60)).max(MOST_DESIGNATORS);
export const quantityField = () => z.number().int('must be a whole number').min(0).max(MOST_QUANTITY);

export const changeLine = command({
  name: 'lines.change',
  http: 'PATCH /lines/{lineId}',
  summary: 'Correct a line of a draft: designators, quantity, text, kind, fitted; its use also when frozen.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    lineId: id(),
    designators: designatorFields().optional(),
    quantity: quantityField().optional(),
    /** Read again as the part: a value, a number, ratings. */
    text: words(500).optional(),
    kind: z.enum(PART_KINDS).optional(),
    fitted: z.boolean().optional(),
    use: z.enum(USES).nullable().optional(),
  }),
  output: z.object({
    id: id(),
    revisionId: id(),
    version: z.number().int(),
    spec: partSpecSchema,
    openQuestions: z.number().int(),
  }),
  async run({ tx, actor, input, record }) {
    const { revision, line: before } = await lockLine(tx, actor.workshopId, input.lineId);
    const corrects =
      input.designators !== undefined ||
      input.quantity !== undefined ||
      input.text !== undefined ||
      input.kind !== undefined ||
      input.fitted !== undefined;
    if (!corrects && input.use === undefined)
      throw new Refusal('input.invalid', 'Say what to change: designators, quantity, text, kind, fitted or use.');
    if (corrects) await lockDraft(tx, actor.workshopId, revision.id);
    const spec = correctedSpec(partSpecSchema.parse(before.spec), input);
    await tx
      .update(line)
      .set({
        ...(corrects
          ? {
              designators: input.designators ?? before.designators,
              quantity: input.quantity ?? before.quantity,
              fitted: spec.fitted,
              ...lineFactsOf(spec),
            }
          : {}),
        ...(input.use === undefined ? {} : { use: input.use }),
      })
      .where(and(eq(line.workshopId, actor.workshopId), eq(line.id, before.id)));
    if (corrects) await settleByHand(tx, actor.workshopId, actor.personId, before.id, input);
    await matchLines(tx, actor.workshopId, revision.id, [before.id]);
    const version = revision.state === 'draft' ? await touchRevision(tx, revision) : revision.version;
    record(before.id, {
      revisionId: revision.id,
      ...(input.text === undefined ? {} : { text: input.text }),
      ...(input.quantity === undefined ? {} : { quantity: input.quantity }),
      ...(input.use === undefined ? {} : { use: input.use }),
    });
    const open = await tx.execute<{ open: number }>(
      sql`select count(*)::int as open from question where workshop_id = ${actor.workshopId} and revision_id = ${revision.id} and answered_at is null`,
    );
    return { id: before.id, revisionId: revision.id, version, spec, openQuestions: open.rows[0]?.open ?? 0 };
  },
});

function correctedSpec(
  before: PartSpec,
  {
    text,
    kind,
    fitted,
  }: { text?: string | undefined; kind?: PartSpec['kind'] | undefined; fitted?: boolean | undefined },
): PartSpec {
  const read =
    text === undefined && kind === undefined
      ? before
      : readPartText(text ?? before.text, { kind: kind ?? before.kind });
  const [doubt] = text === undefined ? [] : read.doubts;
  if (doubt)
    throw new Refusal(
      'input.invalid',
      `${doubt.ask} Write it out, such as ${doubt.options.join(' or ')}. Nothing was changed.`,
      { errors: [{ pointer: '/text', code: doubt.code, detail: doubt.ask }], more: { options: doubt.options } },
    );
  return { ...read, fitted: fitted ?? (text === undefined ? before.fitted : read.fitted) };
}

/** A correction by hand answers the questions about what it corrected. */
async function settleByHand(
  tx: Tx,
  workshopId: string,
  personId: string,
  lineId: string,
  input: {
    quantity?: number | undefined;
    designators?: readonly string[] | undefined;
    text?: string | undefined;
    fitted?: boolean | undefined;
  },
): Promise<void> {
  const counted = input.quantity !== undefined || input.designators !== undefined;
  const read = input.text !== undefined || input.fitted === false;
  await tx
    .update(question)
    .set({ answer: 'corrected in the line', answeredBy: personId, answeredAt: sql`now()` })
    .where(
      and(
        eq(question.workshopId, workshopId),
        eq(question.lineId, lineId),
        sql`answered_at is null`,
        sql`case when code like '%quantity%' then ${counted}::boolean else ${read}::boolean end`,
      ),
    );
}

/**
 * A parts list becomes a revision. The original is kept first, whatever becomes of it; reading happens between two
 * transactions; a list that can't be read changes nothing else. Long lists are read by a job under a progress bar.
 */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { circuit, revision, upload } from '@/db/schema/circuits';
import { progress } from '@/db/schema/records';
import { id, uploadedFile, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { errand } from '@/lib/api/use-case';
import { listQuestions, questionFields } from './list-questions';
import { moveUpload } from './move-upload';
import { isLongList, readList, refusalOfList } from './read-list';
import { bytesOf, type KeptOriginal, MOST_LIST_BYTES } from './upload-bytes';
import { writeRevision } from './write-revision';

const FORM_OVERHEAD_BYTES = 64 * 1024;
const MOST_QUESTIONS_SHOWN = 200;
/** A form has only texts. */
const yes = z.preprocess((value) => (value === 'true' ? true : value === 'false' ? false : value), z.boolean());

export const revisionName = () => words(60);

export const createRevision = errand({
  name: 'revisions.create',
  http: 'POST /revisions',
  summary:
    'Read a parts list into a new revision: a file in a form, the key of an uploaded file, or a pasted table. `freeze` freezes it at once where no question is open.',
  roles: ['builder', 'lead'],
  multipartLimitBytes: MOST_LIST_BYTES + FORM_OVERHEAD_BYTES,
  input: z
    .strictObject({
      circuitId: id(),
      name: revisionName(),
      file: uploadedFile().optional(),
      /** Key in the upload store, as the upload's answer gave it. */
      uploadKey: z.string().min(1).max(200).optional(),
      uploadId: id().optional(),
      /** A table as a spreadsheet puts it on the clipboard. */
      pasted: z.string().max(MOST_LIST_BYTES).optional(),
      freeze: yes.default(false),
    })
    .refine(
      ({ file, uploadKey, uploadId, pasted }) =>
        [file, uploadKey, uploadId, pasted].filter((one) => one !== undefined).length === 1,
      'send one of file, uploadKey, uploadId and pasted',
    ),
  output: z.object({
    id: id(),
    name: z.string(),
    state: z.enum(['draft', 'frozen']),
    uploadId: id(),
    /** `queued`: a job reads it; GET /uploads/{uploadId} tells how far it is. */
    reading: z.enum(['done', 'queued']),
    lines: z.number().int(),
    notLines: z.number().int(),
    openQuestions: z.number().int(),
    /** The first of them. */
    questions: z.array(questionFields),
  }),
  async run({ actor, input, step }) {
    const { workshopId } = actor;
    const kept = await step(async ({ tx, record }) => {
      await refuseTaken(tx, workshopId, input.circuitId, input.name);
      const original = await keepOriginal(tx, workshopId, actor.personId, input);
      record(original.id, { circuitId: input.circuitId, fileName: original.fileName, bytes: original.sizeBytes });
      return original;
    });
    const bytes = await bytesOf(kept);
    const start = {
      workshopId,
      id: newId(),
      circuitId: input.circuitId,
      name: input.name,
      uploadId: kept.id,
      createdBy: actor.personId,
    };
    if (isLongList(bytes)) {
      await step(async ({ tx, record, enqueue }) => {
        await tx.insert(revision).values(start);
        await tx
          .insert(progress)
          .values({ workshopId, id: kept.id, what: `Reading ${kept.fileName}`, done: 0, total: bytes.length });
        await enqueue({
          queue: 'read-upload',
          payload: { uploadId: kept.id, revisionId: start.id, freezeBy: input.freeze ? actor.personId : null },
        });
        record(start.id, { name: input.name, reading: 'queued' });
      });
      return {
        id: start.id,
        name: input.name,
        state: 'draft' as const,
        uploadId: kept.id,
        reading: 'queued' as const,
        lines: 0,
        notLines: 0,
        openQuestions: 0,
        questions: [],
      };
    }
    const read = await readList(bytes, { fileName: kept.fileName });
    if (!read.ok) {
      const refusal = refusalOfList(read.problem, kept);
      await step(async ({ tx, record }) => {
        await rejectUpload(tx, workshopId, kept.id, refusal);
        record(kept.id, { rejected: refusal.detail });
      });
      throw refusal;
    }
    return step(async ({ tx, record }) => {
      await refuseTaken(tx, workshopId, input.circuitId, input.name);
      await tx.insert(revision).values(start);
      const written = await writeRevision(tx, {
        workshopId,
        revisionId: start.id,
        uploadId: kept.id,
        list: read.list,
        freezeBy: input.freeze ? actor.personId : null,
      });
      record(start.id, {
        name: input.name,
        lines: written.lines,
        openQuestions: written.openQuestions,
        state: written.state,
      });
      const questions = await listQuestions(tx, workshopId, start.id, MOST_QUESTIONS_SHOWN);
      return { id: start.id, name: input.name, uploadId: kept.id, reading: 'done' as const, ...written, questions };
    });
  },
});

async function refuseTaken(tx: Tx, workshopId: string, circuitId: string, name: string): Promise<void> {
  const [into] = await tx
    .select({ name: circuit.name })
    .from(circuit)
    .where(and(eq(circuit.workshopId, workshopId), eq(circuit.id, circuitId)))
    .for('share');
  if (!into) throw notFound('circuit');
  const [taken] = await tx
    .select({ id: revision.id })
    .from(revision)
    .where(and(eq(revision.workshopId, workshopId), eq(revision.circuitId, circuitId), eq(revision.name, name)));
  if (taken) throw new Refusal('name.taken', `${into.name} has a revision ${name} already. Nothing was read.`);
}

type Sources = {
  readonly circuitId: string;
  readonly file?: { name: string; bytes: Uint8Array } | undefined;
  readonly uploadKey?: string | undefined;
  readonly uploadId?: string | undefined;
  readonly pasted?: string | undefined;
};
type Kept = KeptOriginal & { readonly id: string; readonly sizeBytes: number };

async function keepOriginal(tx: Tx, workshopId: string, personId: string, input: Sources): Promise<Kept> {
  if (input.file === undefined && input.pasted === undefined) return claimUpload(tx, workshopId, input);
  const content = input.file?.bytes ?? new TextEncoder().encode(input.pasted);
  const fileName = input.file?.name.trim() || 'pasted table';
  if (content.length > MOST_LIST_BYTES)
    throw new Refusal('too-large', `${fileName} is larger than 50 MiB. Nothing was read.`);
  const [row] = await tx
    .insert(upload)
    .values({
      workshopId,
      circuitId: input.circuitId,
      fileName,
      content,
      sizeBytes: content.length,
      uploadedBy: personId,
    })
    .returning({ id: upload.id });
  if (!row) throw new Error('the insert returned no row');
  return { id: row.id, fileName, storeKey: null, content, sizeBytes: content.length };
}

/** A file that came through the upload store; it makes one revision only, so that an original belongs to what was read from it. */
async function claimUpload(tx: Tx, workshopId: string, input: Sources): Promise<Kept> {
  const [row] = await tx
    .select()
    .from(upload)
    .where(
      and(
        eq(upload.workshopId, workshopId),
        input.uploadId === undefined ? eq(upload.storeKey, input.uploadKey ?? '') : eq(upload.id, input.uploadId),
      ),
    )
    .for('update');
  if (!row) throw notFound('upload');
  const [used] = await tx
    .select({ name: revision.name })
    .from(revision)
    .where(and(eq(revision.workshopId, workshopId), eq(revision.uploadId, row.id)))
    .limit(1);
  if (used)
    throw new Refusal(
      'state.refused',
      `${row.fileName} was read into revision ${used.name} already. Copy that revision, or send the file again.`,
    );
  await moveUpload(tx, workshopId, row.id, ['try-again']);
  await tx
    .update(upload)
    .set({ circuitId: input.circuitId })
    .where(and(eq(upload.workshopId, workshopId), eq(upload.id, row.id)));
  return { id: row.id, fileName: row.fileName, storeKey: row.storeKey, content: row.content, sizeBytes: row.sizeBytes };
}

export async function rejectUpload(tx: Tx, workshopId: string, uploadId: string, refusal: Refusal): Promise<void> {
  await moveUpload(tx, workshopId, uploadId, ['reject'], {
    code: refusal.code,
    detail: refusal.detail,
    errors: refusal.errors ?? [],
    more: refusal.more ?? null,
  });
}

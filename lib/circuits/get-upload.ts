/** One upload: what became of it, and while a job reads it how far that is. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { revision, upload } from '@/db/schema/circuits';
import { progress } from '@/db/schema/records';
import { id, instant } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';
import { UPLOAD_STATES } from './upload-states';

export const getUpload = query({
  name: 'uploads.get',
  http: 'GET /uploads/{uploadId}',
  summary: 'What became of an upload; while it is being read, how far it is.',
  roles: 'everyone',
  input: z.strictObject({ uploadId: id() }),
  output: z.object({
    id: id(),
    fileName: z.string(),
    sizeBytes: z.number().int(),
    state: z.enum(UPLOAD_STATES),
    circuitId: id().nullable(),
    revisionId: id().nullable(),
    createdAt: instant(),
    /** Why it was refused: code, detail, errors with row and column, more. */
    problem: z.unknown(),
    progress: z
      .object({
        what: z.string(),
        done: z.number(),
        total: z.number().nullable(),
        state: z.enum(['running', 'done', 'failed', 'cancelled']),
      })
      .nullable(),
  }),
  async run({ tx, actor, input }) {
    const [row] = await tx
      .select({ upload, progress, revisionId: revision.id })
      .from(upload)
      .leftJoin(progress, and(eq(progress.workshopId, upload.workshopId), eq(progress.id, upload.id)))
      .leftJoin(revision, and(eq(revision.workshopId, upload.workshopId), eq(revision.uploadId, upload.id)))
      .where(and(eq(upload.workshopId, actor.workshopId), eq(upload.id, input.uploadId)))
      .orderBy(revision.createdAt)
      .limit(1);
    if (!row) throw notFound('upload');
    const runs = z.enum(['running', 'done', 'failed', 'cancelled']);
    return {
      id: row.upload.id,
      fileName: row.upload.fileName,
      sizeBytes: row.upload.sizeBytes,
      state: z.enum(UPLOAD_STATES).parse(row.upload.state),
      circuitId: row.upload.circuitId,
      revisionId: row.revisionId,
      createdAt: row.upload.createdAt.toISOString(),
      problem: row.upload.problem,
      progress: row.progress && {
        what: row.progress.what,
        done: row.progress.done,
        total: row.progress.total,
        state: runs.parse(row.progress.state),
      },
    };
  },
});

export const cancelReading = command({
  name: 'uploads.cancel-reading',
  http: 'POST /uploads/{uploadId}/cancel',
  summary: 'Stop reading a long list. The file is kept, the unread revision goes.',
  roles: ['builder', 'lead'],
  input: z.strictObject({ uploadId: id() }),
  output: z.object({ uploadId: id(), state: z.literal('cancelled') }),
  async run({ tx, actor, input, record }) {
    const own = and(eq(progress.workshopId, actor.workshopId), eq(progress.id, input.uploadId));
    const [running] = await tx.select({ state: progress.state }).from(progress).where(own).for('update');
    if (!running) throw notFound('upload that is being read');
    if (running.state !== 'running') throw new Refusal('state.refused', 'It is not being read any more.');
    // The job looks at this row as it goes and stops; it removes the revision and notes the upload as refused.
    await tx.update(progress).set({ state: 'cancelled', updatedAt: new Date() }).where(own);
    record(input.uploadId);
    return { uploadId: input.uploadId, state: 'cancelled' as const };
  },
});

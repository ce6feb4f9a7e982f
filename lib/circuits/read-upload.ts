/** The job that reads a long list into its revision, with a progress row, stoppable, all or nothing. Bears a repeat. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { withWorkshop } from '@/db/client';
import { revision, upload } from '@/db/schema/circuits';
import { auditEvent, progress } from '@/db/schema/records';
import { Refusal } from '@/lib/api/problem';
import type { HandledJob } from '@/lib/services/jobs';
import { rejectUpload } from './create-revision';
import { readList, refusalOfList } from './read-list';
import { bytesOf } from './upload-bytes';
import { writeRevision } from './write-revision';

const payloadOf = z.object({ uploadId: z.uuid(), revisionId: z.uuid(), freezeBy: z.uuid().nullable() });

/** Half of the bar is reading, half is writing. */
const READING_SHARE = 0.5;
const TELL_EVERY_MS = 500;

export async function readUpload({ id: jobId, workshopId, payload }: HandledJob): Promise<void> {
  const { uploadId, revisionId, freezeBy } = payloadOf.parse(payload);
  const start = await withWorkshop(workshopId, async (tx) => {
    const [row] = await tx
      .select()
      .from(upload)
      .where(and(eq(upload.workshopId, workshopId), eq(upload.id, uploadId)));
    const [waiting] = await tx
      .select({ id: revision.id, createdBy: revision.createdBy })
      .from(revision)
      .where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)));
    return row?.state === 'received' && waiting ? { original: row, createdBy: waiting.createdBy } : null;
  });
  // Done, refused or cancelled by an earlier try.
  if (!start) return;
  const { original } = start;
  const bytes = await bytesOf(original);
  const bar = progressBar(workshopId, uploadId, bytes.length);
  try {
    const read = await readList(bytes, { fileName: original.fileName, onProgress: bar.reading, signal: bar.signal });
    if (!read.ok && read.problem.code === 'cancelled') throw new ReadingCancelled();
    if (!read.ok) {
      await giveUp(
        workshopId,
        uploadId,
        revisionId,
        refusalOfList(read.problem, { id: uploadId, fileName: original.fileName }),
        'failed',
      );
      return;
    }
    await bar.refuseCancelled();
    const total = read.list.lines.length;
    await withWorkshop(workshopId, async (tx) => {
      const written = await writeRevision(tx, {
        workshopId,
        revisionId,
        uploadId,
        list: read.list,
        freezeBy,
        progress: (done) => bar.writing(done, total),
      });
      await tx
        .update(progress)
        .set({ state: 'done', done: bytes.length, updatedAt: new Date() })
        .where(and(eq(progress.workshopId, workshopId), eq(progress.id, uploadId)));
      await tx.insert(auditEvent).values({
        workshopId,
        personId: start.createdBy,
        command: 'revisions.read',
        subjectId: revisionId,
        detail: { ...written },
        requestId: jobId,
      });
    });
  } catch (error) {
    if (!(error instanceof ReadingCancelled)) throw error;
    await giveUp(
      workshopId,
      uploadId,
      revisionId,
      new Refusal(
        'state.refused',
        `Reading ${original.fileName} was stopped. The file is kept; nothing else was changed.`,
      ),
      'cancelled',
    );
  } finally {
    await bar.stop();
  }
}

class ReadingCancelled extends Error {}

/** The revision that waited for its lines goes; the upload says why. */
async function giveUp(
  workshopId: string,
  uploadId: string,
  revisionId: string,
  refusal: Refusal,
  state: 'failed' | 'cancelled',
): Promise<void> {
  await withWorkshop(workshopId, async (tx) => {
    await tx.delete(revision).where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)));
    await rejectUpload(tx, workshopId, uploadId, refusal);
    await tx
      .update(progress)
      .set({
        state,
        problem: {
          code: refusal.code,
          detail: refusal.detail,
          errors: refusal.errors ?? [],
          more: refusal.more ?? null,
        },
        updatedAt: new Date(),
      })
      .where(and(eq(progress.workshopId, workshopId), eq(progress.id, uploadId)));
  });
}

/** Written on its own connection, so that others see it move while the reading's transaction is open. */
function progressBar(workshopId: string, uploadId: string, totalBytes: number) {
  const stopper = new AbortController();
  let toldAtMs = 0;
  let last: Promise<void> = Promise.resolve();
  const tell = (share: number): void => {
    if (Date.now() - toldAtMs < TELL_EVERY_MS) return;
    toldAtMs = Date.now();
    last = last.then(() => note(share)).catch(() => undefined);
  };
  const note = async (share: number): Promise<void> => {
    const rows = await withWorkshop(workshopId, (tx) =>
      tx
        .update(progress)
        .set({
          done: sql`case when state = 'running' then ${Math.floor(totalBytes * share)}::bigint else done end`,
          updatedAt: new Date(),
        })
        .where(and(eq(progress.workshopId, workshopId), eq(progress.id, uploadId)))
        .returning({ state: progress.state }),
    );
    if (rows[0]?.state === 'cancelled') stopper.abort(new ReadingCancelled());
  };
  return {
    signal: stopper.signal,
    reading: (done: number, total: number): void => tell(total > 0 ? READING_SHARE * Math.min(1, done / total) : 0),
    async refuseCancelled(): Promise<void> {
      await note(READING_SHARE);
      stopper.signal.throwIfAborted();
    },
    async writing(done: number, total: number): Promise<void> {
      tell(READING_SHARE + (1 - READING_SHARE) * (total > 0 ? done / total : 1));
      await last;
      stopper.signal.throwIfAborted();
    },
    stop: (): Promise<void> => last,
  };
}

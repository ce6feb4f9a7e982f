/** The file that a revision was read from, byte for byte. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { revision, upload } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { log } from '@/lib/api/log';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { attachment, bytesOf, type KeptOriginal } from './upload-bytes';

export const originalOfRevision = query({
  name: 'revisions.original',
  http: 'GET /revisions/{revisionId}/original',
  summary: 'The file that the revision was read from.',
  roles: 'everyone',
  input: z.strictObject({ revisionId: id() }),
  output: z.instanceof(Response),
  async run({ tx, actor, input }) {
    const [of] = await tx
      .select({ uploadId: revision.uploadId })
      .from(revision)
      .where(and(eq(revision.workshopId, actor.workshopId), eq(revision.id, input.revisionId)));
    if (!of) throw notFound('revision');
    if (of.uploadId === null) throw notFound('file for this revision');
    return download(await originalOf(tx, actor.workshopId, of.uploadId));
  },
});

export const originalOfUpload = query({
  name: 'uploads.original',
  http: 'GET /uploads/{uploadId}/original',
  summary: 'An uploaded file as it came, a refused one too.',
  roles: 'everyone',
  input: z.strictObject({ uploadId: id() }),
  output: z.instanceof(Response),
  async run({ tx, actor, input }) {
    return download(await originalOf(tx, actor.workshopId, input.uploadId));
  },
});

async function originalOf(tx: Tx, workshopId: string, uploadId: string): Promise<KeptOriginal> {
  const [row] = await tx
    .select({ fileName: upload.fileName, storeKey: upload.storeKey, content: upload.content })
    .from(upload)
    .where(and(eq(upload.workshopId, workshopId), eq(upload.id, uploadId)));
  if (!row) throw notFound('upload');
  return row;
}

/** The store is asked only when the answer is being sent, after the transaction has ended; if it fails then, the download breaks off. */
function download(original: KeptOriginal): Response {
  const body = new ReadableStream<Uint8Array>(
    {
      async pull(controller) {
        try {
          controller.enqueue(await bytesOf(original));
          controller.close();
        } catch (error) {
          log.warn({ err: error, storeKey: original.storeKey }, 'an original could not be fetched');
          controller.error(error);
        }
      },
    },
    // Without it the stream would pull at once, inside the transaction.
    { highWaterMark: 0 },
  );
  return attachment(body, original.fileName, 'application/octet-stream');
}

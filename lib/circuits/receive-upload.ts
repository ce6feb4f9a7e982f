/** Files on their way through the upload store: who may send one, and the row that a finished one gets, once however often the store calls. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { NextRequest } from 'next/server';
import { withWorkshop } from '@/db/client';
import { circuit, upload } from '@/db/schema/circuits';
import { auditEvent } from '@/db/schema/records';
import { log } from '@/lib/api/log';
import { newRequestId } from '@/lib/api/perform';
import { Refusal } from '@/lib/api/problem';
import { credentialsOf } from '@/lib/auth/credentials';
import { loadActor } from '@/lib/auth/load-actor';
import type { StoredUpload, UploadCalls } from '@/lib/services/uploads';
import { MOST_LIST_BYTES } from './upload-bytes';

export async function authoriseUpload(
  request: NextRequest,
  file: { readonly name: string; readonly size: number },
  circuitId: string | null,
): ReturnType<UploadCalls['authorise']> {
  const credentials = await credentialsOf(request);
  if (!credentials) return { ok: false, message: 'Sign in first.' };
  if (file.size > MOST_LIST_BYTES) return { ok: false, message: 'A parts list may have 50 MB. Nothing was sent.' };
  try {
    return await withWorkshop(
      credentials.workshopId,
      async (tx) => {
        const actor = await loadActor(tx, credentials);
        if (!actor.mayWrite || !actor.roles.some((role) => role === 'builder' || role === 'lead'))
          return { ok: false, message: 'Sending a parts list needs the role builder or lead.' };
        if (circuitId !== null) {
          const [into] = await tx
            .select({ id: circuit.id })
            .from(circuit)
            .where(and(eq(circuit.workshopId, actor.workshopId), eq(circuit.id, circuitId)));
          if (!into) return { ok: false, message: 'There is no such circuit in this workshop.' };
        }
        return { ok: true, owner: { workshopId: actor.workshopId, personId: actor.personId } };
      },
      { readOnly: true },
    );
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, message: error.detail };
    throw error;
  }
}

export async function receiveUpload(file: StoredUpload): Promise<{ uploadId: string }> {
  const { workshopId, personId } = file.owner;
  return withWorkshop(workshopId, async (tx) => {
    const [made] = await tx
      .insert(upload)
      .values({
        workshopId,
        circuitId: file.circuitId,
        fileName: file.name,
        storeKey: file.key,
        sizeBytes: file.size,
        uploadedBy: personId,
      })
      .onConflictDoNothing({ target: [upload.workshopId, upload.storeKey] })
      .returning({ id: upload.id });
    if (made) {
      await tx.insert(auditEvent).values({
        workshopId,
        personId,
        command: 'uploads.receive',
        subjectId: made.id,
        detail: { fileName: file.name, bytes: file.size },
        requestId: newRequestId(),
      });
      return { uploadId: made.id };
    }
    const [there] = await tx
      .select({ id: upload.id })
      .from(upload)
      .where(and(eq(upload.workshopId, workshopId), eq(upload.storeKey, file.key)));
    if (!there) throw new Error('an upload is neither new nor there');
    return { uploadId: there.id };
  });
}

export const uploadCalls: UploadCalls = {
  authorise: authoriseUpload,
  complete: receiveUpload,
  failed: (error, key) => log.warn({ err: error, storeKey: key }, 'an upload failed'),
};

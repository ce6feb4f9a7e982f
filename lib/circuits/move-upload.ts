/** Moves an upload along its table of states; an impossible move is a bug and undoes the transaction. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { upload } from '@/db/schema/circuits';
import { UPLOAD_STATES, type UploadAct, type UploadState, uploadStateAfter } from './upload-states';

/** @param problem what is kept of a refusal; null clears an earlier one */
export async function moveUpload(
  tx: Tx,
  workshopId: string,
  uploadId: string,
  acts: readonly UploadAct[],
  problem: unknown = null,
): Promise<void> {
  const own = and(eq(upload.workshopId, workshopId), eq(upload.id, uploadId));
  const [row] = await tx.select({ state: upload.state }).from(upload).where(own).for('update');
  let state: UploadState | undefined = UPLOAD_STATES.find((one) => one === row?.state);
  if (state === undefined) throw new Error(`no upload ${uploadId}`);
  for (const act of acts) {
    const next = uploadStateAfter(state, act);
    if (next === null) throw new Error(`an upload that is ${state} can’t ${act}`);
    state = next;
  }
  await tx.update(upload).set({ state, problem }).where(own);
}

/** Once no question is open: `settle` where that has not been noted yet, then the given acts. */
export async function settleUpload(
  tx: Tx,
  workshopId: string,
  uploadId: string,
  then: readonly UploadAct[],
): Promise<void> {
  const [row] = await tx
    .select({ state: upload.state })
    .from(upload)
    .where(and(eq(upload.workshopId, workshopId), eq(upload.id, uploadId)));
  const acts = [...(row?.state === 'read' ? (['settle'] as const) : []), ...then];
  if (acts.length > 0) await moveUpload(tx, workshopId, uploadId, acts);
}

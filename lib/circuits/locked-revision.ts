/** The lock that every change of a draft takes first, and the checks that come with it. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { line, revision, upload } from '@/db/schema/circuits';
import { notFound, Refusal } from '@/lib/api/problem';

export type LockedRevision = Pick<
  typeof revision.$inferSelect,
  'id' | 'workshopId' | 'circuitId' | 'name' | 'uploadId' | 'version' | 'reading'
> & { readonly state: 'draft' | 'frozen' };

/** @param version what the person saw; another one now is refused with the current */
export async function lockRevision(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  version?: number,
): Promise<LockedRevision> {
  const [row] = await tx
    .select()
    .from(revision)
    .where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)))
    .for('update');
  if (!row) throw notFound('revision');
  if (version !== undefined && row.version !== version) {
    throw new Refusal(
      'version.stale',
      `Somebody changed revision ${row.name} since you looked. Nothing of yours was written; look at it again.`,
      { more: { version: row.version } },
    );
  }
  return { ...row, state: row.state === 'frozen' ? 'frozen' : 'draft' };
}

/** Locks it and refuses where it may not change: frozen, or its list is still being read. */
export async function lockDraft(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  version?: number,
): Promise<LockedRevision> {
  const locked = await lockRevision(tx, workshopId, revisionId, version);
  if (locked.state === 'frozen')
    throw new Refusal('state.refused', `Revision ${locked.name} is frozen and never changes: make a new one.`);
  if (locked.uploadId !== null) {
    const [from] = await tx
      .select({ state: upload.state })
      .from(upload)
      .where(and(eq(upload.workshopId, workshopId), eq(upload.id, locked.uploadId)));
    if (from?.state === 'received')
      throw new Refusal('state.refused', `The list of revision ${locked.name} is still being read.`);
  }
  return locked;
}

/** The line with its revision, both locked, revision first. */
export async function lockLine(tx: Tx, workshopId: string, lineId: string) {
  const [seen] = await tx
    .select({ revisionId: line.revisionId })
    .from(line)
    .where(and(eq(line.workshopId, workshopId), eq(line.id, lineId)));
  if (!seen) throw notFound('line');
  const locked = await lockRevision(tx, workshopId, seen.revisionId);
  const [row] = await tx
    .select()
    .from(line)
    .where(and(eq(line.workshopId, workshopId), eq(line.id, lineId)))
    .for('update');
  if (!row) throw notFound('line');
  return { revision: locked, line: row };
}

/** Raises the version, so that whoever looks at an older one is told. @returns the new version */
export async function touchRevision(tx: Tx, locked: LockedRevision): Promise<number> {
  const [now] = await tx
    .update(revision)
    .set({ version: sql`${revision.version} + 1` })
    .where(and(eq(revision.workshopId, locked.workshopId), eq(revision.id, locked.id)))
    .returning({ version: revision.version });
  if (!now) throw new Error('a locked revision is gone');
  return now.version;
}

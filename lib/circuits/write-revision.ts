/** A read list becomes the lines, questions and candidates of a revision, in the caller's transaction. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/circuits';
import { workshop } from '@/db/schema/people';
import { matchLines } from './match-revision';
import { moveUpload } from './move-upload';
import type { ReadList } from './read-list';
import { settleQuestions, type Standing } from './settle-questions';
import { storeLines, storeQuestions } from './store-lines';

export interface WrittenRevision {
  readonly lines: number;
  readonly notLines: number;
  readonly openQuestions: number;
  readonly state: 'draft' | 'frozen';
}

interface Writing {
  readonly workshopId: string;
  readonly revisionId: string;
  readonly uploadId: string;
  readonly list: ReadList;
  /** Freeze where no question is open. */
  readonly freezeBy: string | null;
  /** The list was read before and is read again: answers given to its rows, by place. */
  readonly earlier?: Standing['earlier'];
  readonly again?: boolean;
  readonly progress?: (done: number) => Promise<void>;
}

/** The revision row exists, as a draft without lines. */
export async function writeRevision(tx: Tx, writing: Writing): Promise<WrittenRevision> {
  const { workshopId, revisionId, uploadId, list } = writing;
  const [setting] = await tx
    .select({ taperConvention: workshop.taperConvention })
    .from(workshop)
    .where(eq(workshop.id, workshopId));
  const standing: Standing = {
    taperConvention: setting?.taperConvention ?? 'ask',
    ...(writing.earlier ? { earlier: writing.earlier } : {}),
  };
  const { lines, open } = settleQuestions(list.lines, list.questions, standing);
  await tx
    .update(revision)
    .set({ reading: list.reading, uploadId })
    .where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)));
  const stored = await storeLines(tx, workshopId, revisionId, lines, writing.progress);
  await storeQuestions(tx, workshopId, revisionId, open, stored);
  await matchLines(tx, workshopId, revisionId);
  const freezes = writing.freezeBy !== null && open.length === 0 && lines.length > 0;
  await moveUpload(tx, workshopId, uploadId, [
    writing.again === true ? 'read-again' : 'read',
    ...(open.length === 0 && writing.again !== true ? (['settle'] as const) : []),
    ...(freezes ? (['freeze'] as const) : []),
  ]);
  if (freezes) {
    await tx
      .update(revision)
      .set({ state: 'frozen', frozenAt: sql`now()`, frozenBy: writing.freezeBy })
      .where(and(eq(revision.workshopId, workshopId), eq(revision.id, revisionId)));
  }
  return {
    lines: lines.length,
    notLines: list.reading.notLineCount,
    openQuestions: open.length,
    state: freezes ? 'frozen' : 'draft',
  };
}

/** Bins that stock may be put into, held under a share lock so that none is retired meanwhile. */
import 'server-only';
import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { bin } from '@/db/schema/stores';
import { notFound, Refusal } from '@/lib/api/problem';

export interface UsableBin {
  readonly id: string;
  readonly code: string;
}

/** Refuses an unknown bin and a retired one; locks in the order of ids. Call it before any lot is locked or made. */
export async function usableBins(
  tx: Tx,
  workshopId: string,
  binIds: readonly string[],
): Promise<Map<string, UsableBin>> {
  const wanted = [...new Set(binIds)];
  if (wanted.length === 0) return new Map();
  const rows = await tx
    .select({ id: bin.id, code: bin.code, retiredAt: bin.retiredAt })
    .from(bin)
    .where(and(eq(bin.workshopId, workshopId), inArray(bin.id, wanted)))
    .orderBy(asc(bin.id))
    .for('share');
  if (rows.length !== wanted.length) throw notFound('bin');
  const retired = rows.find((row) => row.retiredAt !== null);
  if (retired)
    throw new Refusal('rule.forbids', `Bin ${retired.code} is retired. Choose another; nothing was changed.`);
  return new Map(rows.map(({ id, code }) => [id, { id, code }]));
}

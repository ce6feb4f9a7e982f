/** Document numbers without gaps: a locked counter per workshop, kind and year, raised in the document's own transaction. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { counter } from '@/db/schema/records';

export type NumberedDocument = 'order' | 'batch' | 'receipt' | 'count';

const PREFIXES: Record<NumberedDocument, string> = { order: '', batch: 'B-', receipt: 'R-', count: 'C-' };

/** The next number of the year, such as `2026-0041` for an order. Held (locked) until commit; a rolled-back one is given again. */
export async function nextNumber(
  tx: Tx,
  workshopId: string,
  kind: NumberedDocument,
  today: Date = new Date(),
): Promise<string> {
  const year = today.getUTCFullYear();
  const [row] = await tx
    .insert(counter)
    .values({ workshopId, name: `${kind}:${year}`, value: 1 })
    .onConflictDoUpdate({ target: [counter.workshopId, counter.name], set: { value: sql`${counter.value} + 1` } })
    .returning({ value: counter.value });
  if (!row) throw new Error(`no counter for ${kind} ${year}`);
  return `${PREFIXES[kind]}${year}-${String(row.value).padStart(4, '0')}`;
}

/** Parts on a shelf and a frozen revision that asks for them, made through the same use cases a person would use where there is one. */
import { sql } from 'drizzle-orm';
import { withWorkshop } from '@/db/client';
import { circuit, decision, line, revision } from '@/db/schema/circuits';
import { newId } from '@/db/schema/new-id';
import { checkLedger } from '@/lib/stores/check-ledger';
import { createCabinet } from '@/lib/stores/create-cabinet';
import { listBins } from '@/lib/stores/list-bins';
import { openingStock } from '@/lib/stores/opening-stock';
import { createPart } from '@/lib/stores/create-part';
import { expect } from 'vitest';
import { act, type TestWorkshop } from './workshop';

export interface Bins {
  readonly [code: string]: string;
}

export async function makeBins(workshop: TestWorkshop, code = 'A'): Promise<Bins> {
  const cabinet = await act(createCabinet, workshop.as.storekeeper, { code, room: 'bench', columns: 4, rows: 3 });
  const { rows } = await act(listBins, workshop.as.storekeeper, { cabinetId: cabinet.id });
  return Object.fromEntries(rows.map((row) => [row.code, row.id]));
}

export async function makePart(workshop: TestWorkshop, text: string): Promise<string> {
  return (await act(createPart, workshop.as.storekeeper, { text })).id;
}

export async function stock(
  workshop: TestWorkshop,
  partId: string,
  binId: string | undefined,
  quantity: number,
): Promise<void> {
  if (binId === undefined) throw new Error('no such bin');
  await act(openingStock, workshop.as.storekeeper, { entries: [{ partId, binId, quantity }] });
}

/** A frozen revision whose lines have been decided for the given parts. */
export async function makeRevision(
  workshop: TestWorkshop,
  wants: readonly { partId: string | null; quantity: number }[],
): Promise<{ revisionId: string; lineIds: string[] }> {
  const builder = workshop.as.builder.personId;
  return withWorkshop(workshop.id, async (tx) => {
    const [made] = await tx
      .insert(circuit)
      .values({ workshopId: workshop.id, name: `Circuit ${newId()}`, railsVolts: [12, -12] })
      .returning();
    if (!made) throw new Error('no circuit');
    const revisionId = newId();
    await tx
      .insert(revision)
      .values({ workshopId: workshop.id, id: revisionId, circuitId: made.id, name: 'A', createdBy: builder });
    const lineIds = wants.map(() => newId());
    await tx.insert(line).values(
      wants.map((want, index) => ({
        workshopId: workshop.id,
        id: lineIds[index] ?? newId(),
        revisionId,
        position: index + 1,
        sourceRow: index + 2,
        designators: Array.from({ length: want.quantity }, (_, n) => `R${index * 100 + n + 1}`),
        quantity: want.quantity,
        fitted: true,
        kind: 'resistor',
        text: `line ${index + 1}`,
        spec: {},
        specKey: `line ${index + 1}`,
      })),
    );
    const decided = wants.flatMap((want, index) =>
      want.partId === null
        ? []
        : [
            {
              workshopId: workshop.id,
              lineId: lineIds[index] ?? '',
              partId: want.partId,
              verdict: 'same',
              reason: 'asked for',
              specKey: `line ${index + 1}`,
              decidedBy: builder,
            },
          ],
    );
    if (decided.length > 0) await tx.insert(decision).values(decided);
    await tx.execute(
      sql`update revision set state = 'frozen', frozen_at = now(), frozen_by = ${builder} where workshop_id = ${workshop.id} and id = ${revisionId}`,
    );
    return { revisionId, lineIds };
  });
}

/** Fails the test where any invariant of the ledger is broken. */
export async function expectLedgerHolds(workshop: TestWorkshop): Promise<void> {
  const reports = await withWorkshop(workshop.id, (tx) => checkLedger(tx, workshop.id), { readOnly: true });
  expect(reports.filter((report) => report.broken.length > 0)).toEqual([]);
}

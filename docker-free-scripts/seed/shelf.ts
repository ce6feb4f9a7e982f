/** Cabinets, the catalogue and what lies in the bins, as it was entered when the workshop began its ledger. */
import { type Tx, withWorkshop } from '@/db/client';
import { part } from '@/db/schema/catalogue';
import { newId } from '@/db/schema/new-id';
import { bin, lot, movement } from '@/db/schema/stores';
import { type DemoPart, demoParts } from '@/db/seed/catalogue';
import { toDecimal } from '@/lib/electronics/quantity';
import { readPartText } from '@/lib/electronics/read-part-text';
import { createCabinet } from '@/lib/stores/create-cabinet';
import { and, eq } from 'drizzle-orm';
import { as, type People } from './acting';

const OPENED_DAYS_AGO = 60;
/** A drawer of small parts; what the drawn level is measured against. */
const CAPACITY: Partial<Record<DemoPart['kind'], number>> = {
  resistor: 500,
  capacitor: 400,
  diode: 500,
  hardware: 400,
  connector: 200,
};

export async function makeShelf(workshopId: string, people: People): Promise<Map<string, string>> {
  for (const [index, [code, room]] of (
    [
      ['A', 'back room, left'],
      ['B', 'back room, right'],
      ['C', 'by the bench'],
    ] as const
  ).entries()) {
    await as(people.storekeeper, createCabinet, {
      code,
      name: `Cabinet ${code}`,
      room,
      columns: 15,
      rows: 4,
      walkOrder: index + 1,
    });
  }
  return withWorkshop(workshopId, async (tx) => {
    const ids = await insertParts(tx, workshopId);
    await fillBins(tx, workshopId, people.storekeeper.personId, ids);
    return ids;
  });
}

async function insertParts(tx: Tx, workshopId: string): Promise<Map<string, string>> {
  const ids = new Map(demoParts.map((one) => [one.name, newId()]));
  await tx.insert(part).values(
    demoParts.map((one) => {
      const spec = readPartText(one.text, { kind: one.kind, taperConvention: 'letters' });
      return {
        workshopId,
        id: ids.get(one.name) ?? newId(),
        name: one.name,
        description: one.description,
        kind: one.kind,
        partNumber: spec.partNumber,
        family: spec.family,
        value: spec.value ? toDecimal(spec.value) : null,
        unit: spec.value?.unit ?? null,
        tolerancePercent: spec.tolerancePercent,
        ratedVolts: spec.ratedVolts,
        ratedWatts: spec.ratedWatts,
        ratedAmperes: spec.ratedAmperes,
        dielectric: spec.dielectric,
        technology: spec.technology,
        taper: spec.taper,
        mounting: spec.mounting ?? (one.kind === 'resistor' || one.kind === 'capacitor' ? 'through-hole' : null),
        package: spec.package,
        safety: one.kind === 'fuse' || one.kind === 'transformer' || /\bX2\b/.test(one.text),
        reorderPoint: one.reorderPoint ?? null,
        reorderQuantity: one.reorderQuantity ?? null,
      };
    }),
  );
  return ids;
}

/** One part a bin while bins last, then two: as drawers fill up in a real workshop. */
async function fillBins(tx: Tx, workshopId: string, personId: string, ids: ReadonlyMap<string, string>): Promise<void> {
  const bins = await tx
    .select({ id: bin.id, code: bin.code })
    .from(bin)
    .where(eq(bin.workshopId, workshopId))
    .orderBy(bin.code);
  const stocked = demoParts.filter((one) => one.stock > 0);
  const at = new Date(Date.now() - OPENED_DAYS_AGO * 86_400_000);
  const lots = stocked.map((one, index) => {
    // The last few bins stay empty, for what the next delivery brings.
    const place = bins[index % (bins.length - 6)];
    if (!place) throw new Error('the cabinets have no bins');
    return { one, lotId: newId(), partId: ids.get(one.name) ?? '', binId: place.id };
  });
  await tx.insert(lot).values(
    lots.map(({ one, ...row }) => ({
      workshopId,
      id: row.lotId,
      partId: row.partId,
      binId: row.binId,
      unitCost: one.price,
      receivedAt: at,
    })),
  );
  await tx.insert(movement).values(
    lots.map(({ one, ...row }, index) => ({
      workshopId,
      at,
      kind: 'opening',
      lotId: row.lotId,
      partId: row.partId,
      binId: row.binId,
      quantity: one.stock,
      referenceType: 'opening',
      referenceId: row.lotId,
      reason: 'opening stock',
      personId,
      requestKey: `demo opening ${workshopId}`,
      requestLine: index,
    })),
  );
  for (const { one, binId } of lots) {
    const capacity = CAPACITY[one.kind] ?? 60;
    await tx
      .update(bin)
      .set({ capacity })
      .where(and(eq(bin.workshopId, workshopId), eq(bin.id, binId)));
  }
}

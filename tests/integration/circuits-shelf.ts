/** Parts with stock for the circuits' tests: parts by their use case, stock as rows of the ledger. */
import { withWorkshop } from '@/db/client';
import { bin, cabinet, lot, movement } from '@/db/schema/stores';
import { newId } from '@/db/schema/new-id';
import { createPart } from '@/lib/stores/create-part';
import { act, type TestWorkshop } from '../support/workshop';

export type Shelf = (text: string, quantity: number, bin?: string) => Promise<string>;

/** One cabinet A of four by three; bins are A-01-1 to A-04-3. */
export async function makeShelf(workshop: TestWorkshop): Promise<Shelf> {
  const bins = new Map<string, string>();
  await withWorkshop(workshop.id, async (tx) => {
    const cabinetId = newId();
    await tx
      .insert(cabinet)
      .values({ workshopId: workshop.id, id: cabinetId, code: 'A', room: 'bench', columns: 4, rows: 3 });
    for (let column = 1; column <= 4; column += 1) {
      for (let row = 1; row <= 3; row += 1) {
        const code = `A-0${column}-${row}`;
        bins.set(code, newId());
        await tx.insert(bin).values({ workshopId: workshop.id, id: bins.get(code), cabinetId, code, column, row });
      }
    }
  });
  return async (text, quantity, code = 'A-01-1') => {
    const { id: partId } = await act(createPart, workshop.as.storekeeper, { text });
    const binId = bins.get(code);
    if (binId === undefined) throw new Error(`no bin ${code}`);
    if (quantity === 0) return partId;
    await withWorkshop(workshop.id, async (tx) => {
      const lotId = newId();
      await tx.insert(lot).values({ workshopId: workshop.id, id: lotId, partId, binId });
      await tx.insert(movement).values({
        workshopId: workshop.id,
        kind: 'opening',
        lotId,
        partId,
        binId,
        quantity,
        referenceType: 'test',
        referenceId: lotId,
        requestKey: lotId,
        requestLine: 0,
      });
    });
    return partId;
  };
}

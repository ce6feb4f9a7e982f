/** A cabinet with all its drawers, each a bin coded by where it is. */
import 'server-only';
import { z } from 'zod';
import { bin, cabinet } from '@/db/schema/stores';
import { id, words } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';

export const capacity = z.number().int().min(1).max(100_000_000).nullable().default(null);

export const createCabinet = command({
  name: 'cabinets.create',
  http: 'POST /cabinets',
  summary: 'Add a cabinet, by default with all its bins, coded cabinet-column-row: A-06-1.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({
    code: z.string().regex(/^[A-Z][A-Z0-9]{0,5}$/, 'is a letter, or a letter and digits, such as A or B2'),
    name: z.string().trim().max(80).default(''),
    room: words(80),
    columns: z.number().int().min(1).max(60),
    rows: z.number().int().min(1).max(60),
    walkOrder: z.number().int().min(0).max(10_000).default(0),
    capacity,
    /** False for a cabinet whose bins come by pattern (POST /bins). */
    withBins: z.boolean().default(true),
  }),
  output: z.object({ id: id(), bins: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { capacity: units, withBins, ...fields } = input;
    const [made] = await tx
      .insert(cabinet)
      .values({ ...fields, workshopId: actor.workshopId })
      .returning({ id: cabinet.id });
    if (!made) throw new Error('the insert returned no row');
    const places = withBins ? input.columns * input.rows : 0;
    if (places > 0) {
      await tx.insert(bin).values(
        Array.from({ length: places }, (_, index) => {
          const [column, row] = [Math.floor(index / input.rows) + 1, (index % input.rows) + 1];
          const code = `${input.code}-${String(column).padStart(2, '0')}-${row}`;
          return { workshopId: actor.workshopId, cabinetId: made.id, code, column, row, capacity: units };
        }),
      );
    }
    record(made.id, { code: input.code, bins: places });
    return { id: made.id, bins: places };
  },
});

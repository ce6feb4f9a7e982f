/** Bins of a cabinet in bulk, by a pattern such as `A-{01..12}-{1..6}`. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { bin, cabinet } from '@/db/schema/stores';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { expandBinPattern } from '@/lib/planning/bin-pattern';
import { capacity } from './create-cabinet';

export const createBins = command({
  name: 'bins.create',
  http: 'POST /bins',
  summary: 'Add bins to a cabinet by a pattern: the first range is the column, the second the row.',
  roles: ['storekeeper', 'lead'],
  input: z.strictObject({ cabinetId: id(), pattern: z.string().trim().min(1).max(60), capacity }),
  output: z.object({ bins: z.array(z.object({ id: id(), code: z.string() })) }),
  async run({ tx, actor, input, record }) {
    const [place] = await tx
      .select({ id: cabinet.id, code: cabinet.code, columns: cabinet.columns, rows: cabinet.rows })
      .from(cabinet)
      .where(and(eq(cabinet.workshopId, actor.workshopId), eq(cabinet.id, input.cabinetId)))
      .for('share');
    if (!place) throw notFound('cabinet');
    const planned = expandBinPattern(input.pattern);
    const refuse = (why: string) =>
      new Refusal('input.invalid', `The pattern ${why}.`, {
        errors: [{ pointer: '/pattern', code: 'pattern', detail: why }],
      });
    if (!planned.ok) throw refuse(planned.why);
    const outside = planned.bins.find((one) => one.column > place.columns || one.row > place.rows);
    if (outside)
      throw refuse(
        `puts ${outside.code} at column ${outside.column}, row ${outside.row}; cabinet ${place.code} has ${place.columns} columns of ${place.rows}`,
      );
    const made = await tx
      .insert(bin)
      .values(
        planned.bins.map((one) => ({
          ...one,
          workshopId: actor.workshopId,
          cabinetId: place.id,
          capacity: input.capacity,
        })),
      )
      .returning({ id: bin.id, code: bin.code });
    record(place.id, { pattern: input.pattern, bins: made.length });
    return { bins: made };
  },
});

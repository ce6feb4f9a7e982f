/** Changing what a part is called and when it is bought again. What it *is* stays: another value is another part. */
import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { id, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';

export const reorderFields = {
  reorderPoint: z.number().int().min(0).max(100_000_000).nullable().optional(),
  reorderQuantity: z.number().int().min(1).max(100_000_000).nullable().optional(),
};

export const changePart = command({
  name: 'parts.change',
  http: 'PATCH /parts/{partId}',
  summary:
    'Change a part’s name, description, number or reorder figures; what is left out stays. Carries the version it was seen at.',
  roles: ['storekeeper', 'buyer', 'lead'],
  input: z.strictObject({
    partId: id(),
    version: z.number().int(),
    name: words(80).optional(),
    description: z.string().trim().max(500).optional(),
    partNumber: words(80).nullable().optional(),
    ...reorderFields,
  }),
  output: z.object({ id: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { partId, version, ...given } = input;
    const changes = Object.fromEntries(Object.entries(given).filter(([, value]) => value !== undefined));
    const own = and(eq(part.workshopId, actor.workshopId), eq(part.id, partId));
    const [row] = await tx
      .update(part)
      .set({ ...changes, version: version + 1 })
      .where(and(own, eq(part.version, version)))
      .returning({ id: part.id, version: part.version });
    if (!row) {
      const [held] = await tx
        .select({
          version: part.version,
          name: part.name,
          description: part.description,
          partNumber: part.partNumber,
          reorderPoint: part.reorderPoint,
          reorderQuantity: part.reorderQuantity,
        })
        .from(part)
        .where(own);
      if (!held) throw notFound('part');
      throw new Refusal(
        'version.stale',
        'Somebody changed this part since you looked. Nothing of yours was kept; look at theirs and change it again.',
        { more: held },
      );
    }
    record(partId, changes);
    return row;
  },
});

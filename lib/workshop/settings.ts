/** The workshop's own rules: approval limit, taper convention, over-delivery, letterhead. */
import 'server-only';
import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { workshop } from '@/db/schema/people';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';

const TAPER_CONVENTIONS = ['ask', 'letters', 'old-european'] as const;

const settings = z.object({
  workshopId: id(),
  name: z.string(),
  currency: z.string(),
  approvalLimitMinor: z.number().int(),
  taperConvention: z.enum(TAPER_CONVENTIONS),
  overDeliveryPercent: z.number().int(),
  letterhead: z.string(),
});

export const getSettings = query({
  name: 'settings.get',
  http: 'GET /settings',
  summary: 'The workshop’s settings.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: settings,
  async run({ tx, actor }) {
    const [row] = await tx.select().from(workshop).where(eq(workshop.id, actor.workshopId));
    if (!row) throw notFound('workshop');
    return {
      workshopId: row.id,
      name: row.name,
      currency: row.currency,
      approvalLimitMinor: row.approvalLimitMinor,
      taperConvention: z.enum(TAPER_CONVENTIONS).parse(row.taperConvention),
      overDeliveryPercent: row.overDeliveryPercent,
      letterhead: row.letterhead,
    };
  },
});

export const changeSettings = command({
  name: 'settings.change',
  http: 'PATCH /settings',
  summary: 'Change the workshop’s settings; what is left out stays.',
  roles: ['lead'],
  input: z.strictObject({
    approvalLimitMinor: z.number().int().min(0).max(1_000_000_000).optional(),
    taperConvention: z.enum(TAPER_CONVENTIONS).optional(),
    overDeliveryPercent: z.number().int().min(0).max(100).optional(),
    letterhead: z.string().trim().max(500).optional(),
  }),
  output: z.object({ workshopId: id() }),
  async run({ tx, actor, input, record }) {
    const changes = Object.fromEntries(Object.entries(input).filter(([, value]) => value !== undefined));
    if (Object.keys(changes).length > 0)
      await tx.update(workshop).set(changes).where(eq(workshop.id, actor.workshopId));
    record(actor.workshopId, changes);
    return { workshopId: actor.workshopId };
  },
});

/** A new part from the text on its bag: the same reader that reads parts lists says what it is. */
import 'server-only';
import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { workshop } from '@/db/schema/people';
import { id, words } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { toDecimal } from '@/lib/electronics/quantity';
import { readPartText } from '@/lib/electronics/read-part-text';
import { reorderFields } from './change-part';

const kind = z.enum(PART_KINDS);
const conventions = z.enum(['ask', 'letters', 'old-european']);
/** Kinds that PRODUCT.md never gives a stand-in, whatever the text says. */
const SAFETY_KINDS: readonly string[] = ['fuse', 'transformer', 'optocoupler'];
const SAFETY_WORDS = /\b[XY][12]\b|\bmains\b|\bprotective earth\b/i;

export const createPart = command({
  name: 'parts.create',
  http: 'POST /parts',
  summary: 'Add a part from a text that the reader understands, such as `4k7 1 % 0.25 W` or `TL072CP`.',
  roles: ['storekeeper', 'buyer', 'lead'],
  input: z.strictObject({
    text: words(200),
    /** The text, where left out. */
    name: words(80).optional(),
    description: z.string().trim().max(500).default(''),
    partNumber: words(80).nullable().default(null),
    kind: kind.optional(),
    /** Settles a bare taper letter where the workshop asks every time. */
    taper: z.enum(['linear', 'log', 'reverse-log']).optional(),
    stockUnit: z.enum(['piece', 'mm', 'mg']).default('piece'),
    safety: z.boolean().default(false),
    ...reorderFields,
  }),
  output: z.object({ id: id(), name: z.string(), kind, safety: z.boolean() }),
  async run({ tx, actor, input, record, enqueue }) {
    const [shop] = await tx
      .select({ convention: workshop.taperConvention })
      .from(workshop)
      .where(eq(workshop.id, actor.workshopId));
    const spec = readPartText(input.text, {
      kind: input.kind ?? null,
      taperConvention: conventions.parse(shop?.convention ?? 'ask'),
    });
    if (spec.kind === null) {
      const detail = `“${input.text}” does not say what kind of part it is. Choose the kind.`;
      throw new Refusal('input.invalid', detail, {
        errors: [{ pointer: '/kind', code: 'required', detail: 'choose the kind' }],
      });
    }
    const doubt = spec.doubts[0];
    const settled = input.taper !== undefined && spec.doubts.every((one) => one.code.startsWith('taper'));
    if (doubt && !settled) {
      const pointer = doubt.code.startsWith('taper') ? '/taper' : '/text';
      throw new Refusal('input.invalid', doubt.ask, {
        errors: [{ pointer, code: doubt.code, detail: doubt.options.join(', ') }],
        more: { options: doubt.options },
      });
    }
    const name = input.name ?? (input.text.length > 80 ? input.text.slice(0, 80).trim() : input.text);
    const safety =
      input.safety || SAFETY_KINDS.includes(spec.kind) || SAFETY_WORDS.test(`${input.text} ${input.description}`);
    const [made] = await tx
      .insert(part)
      .values({
        workshopId: actor.workshopId,
        name,
        description: input.description,
        kind: spec.kind,
        partNumber: input.partNumber ?? spec.partNumber,
        family: spec.family,
        value: spec.value ? toDecimal(spec.value) : null,
        unit: spec.value?.unit ?? null,
        tolerancePercent: spec.tolerancePercent,
        ratedVolts: spec.ratedVolts,
        ratedWatts: spec.ratedWatts,
        ratedAmperes: spec.ratedAmperes,
        dielectric: spec.dielectric,
        technology: spec.technology,
        taper: input.taper ?? spec.taper,
        mounting: spec.mounting,
        package: spec.package,
        safety,
        stockUnit: input.stockUnit,
        reorderPoint: input.reorderPoint ?? null,
        reorderQuantity: input.reorderQuantity ?? null,
      })
      .returning({ id: part.id });
    if (!made) throw new Error('the insert returned no row');
    // Lines that found nothing may find it.
    await enqueue({ queue: 'match-stock-changed', payload: { partIds: [made.id] } });
    record(made.id, { name, text: input.text });
    return { id: made.id, name, kind: spec.kind, safety };
  },
});

/** Suppliers and what they offer. An offer's breaks are written whole: the new ones replace the old. */
import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { z } from 'zod';
import { part } from '@/db/schema/catalogue';
import { offer, offerBreak, supplier } from '@/db/schema/purchasing';
import { id, pageFields, pageOf, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';

const currency = z
  .string()
  .regex(/^[A-Z]{3}$/, 'is not an ISO 4217 currency such as EUR')
  .refine((code) => Intl.supportedValuesOf('currency').includes(code), 'is not an ISO 4217 currency that is in use');
const minor = z.number().int().min(0).max(100_000_000);

const supplierFields = {
  name: words(120),
  email: z.email('is not an e-mail address').max(254),
  address: z.string().trim().max(500).default(''),
  currency,
  paymentAccount: z
    .string()
    .regex(/^acct_[A-Za-z0-9]{6,60}$/, 'is not a connected account of the payment service')
    .nullable()
    .default(null),
  postageMinor: minor.default(0),
  postageFreeFromMinor: minor.nullable().default(null),
  minimumOrderMinor: minor.default(0),
  leadTimeDays: z.number().int().min(0).max(730).default(7),
};

export const createSupplier = command({
  name: 'suppliers.create',
  http: 'POST /suppliers',
  summary: 'Add a supplier.',
  roles: ['buyer', 'lead'],
  input: z.strictObject(supplierFields),
  output: z.object({ id: id() }),
  async run({ tx, actor, input, record }) {
    const [row] = await tx
      .insert(supplier)
      .values({ ...input, workshopId: actor.workshopId })
      .returning({ id: supplier.id });
    if (!row) throw new Error('the insert returned no row');
    record(row.id, { name: input.name });
    return row;
  },
});

export const changeSupplier = command({
  name: 'suppliers.change',
  http: 'PUT /suppliers/{supplierId}',
  summary: 'Change a supplier; orders already submitted keep what was agreed.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ supplierId: id(), version: z.number().int(), ...supplierFields }),
  output: z.object({ id: id(), version: z.number().int() }),
  async run({ tx, actor, input, record }) {
    const { supplierId, version, ...fields } = input;
    const [held] = await tx
      .select({ version: supplier.version, currency: supplier.currency })
      .from(supplier)
      .where(and(eq(supplier.workshopId, actor.workshopId), eq(supplier.id, supplierId)))
      .for('update');
    if (!held) throw notFound('supplier');
    if (held.version !== version)
      throw new Refusal('version.stale', 'Somebody changed this supplier since you looked.', {
        more: { version: held.version },
      });
    const [row] = await tx
      .update(supplier)
      .set({ ...fields, version: version + 1 })
      .where(and(eq(supplier.workshopId, actor.workshopId), eq(supplier.id, supplierId)))
      .returning({ id: supplier.id, version: supplier.version });
    if (!row) throw notFound('supplier');
    record(supplierId, fields);
    return row;
  },
});

export const listSuppliers = query({
  name: 'suppliers.list',
  http: 'GET /suppliers',
  summary: 'List suppliers with how much they offer.',
  roles: 'everyone',
  input: z.strictObject(pageFields),
  output: pageOf(
    z.object({
      id: id(),
      name: z.string(),
      email: z.string(),
      address: z.string(),
      currency: z.string(),
      paymentAccount: z.string().nullable(),
      postageMinor: z.number().int(),
      postageFreeFromMinor: z.number().int().nullable(),
      minimumOrderMinor: z.number().int(),
      leadTimeDays: z.number().int(),
      version: z.number().int(),
      offers: z.number().int(),
    }),
  ),
  async run({ tx, actor, input }) {
    const rows = await tx
      .select({
        id: supplier.id,
        name: supplier.name,
        email: supplier.email,
        address: supplier.address,
        currency: supplier.currency,
        paymentAccount: supplier.paymentAccount,
        postageMinor: supplier.postageMinor,
        postageFreeFromMinor: supplier.postageFreeFromMinor,
        minimumOrderMinor: supplier.minimumOrderMinor,
        leadTimeDays: supplier.leadTimeDays,
        version: supplier.version,
        offers: sql<number>`(select count(*)::int from ${offer} f where f.workshop_id = ${supplier.workshopId} and f.supplier_id = ${supplier.id} and f.retired_at is null)`,
        total: sql<number>`count(*) over ()::int`,
      })
      .from(supplier)
      .where(and(eq(supplier.workshopId, actor.workshopId), isNull(supplier.retiredAt)))
      .orderBy(asc(supplier.name))
      .limit(input.size)
      .offset((input.page - 1) * input.size);
    return {
      rows: rows.map(({ total: _, ...row }) => row),
      total: rows[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});

const breaks = z
  .array(
    z.strictObject({
      fromQuantity: z.number().int().min(1).max(10_000_000),
      unitPrice: z
        .string()
        .regex(/^\d{1,9}(\.\d{1,6})?$/, 'is not a price with at most six places')
        .refine((price) => /[1-9]/.test(price), 'is nothing'),
    }),
  )
  .min(1, 'needs at least one price')
  .max(30)
  .refine(
    (list) => new Set(list.map((step) => step.fromQuantity)).size === list.length,
    'has two breaks at one quantity',
  );

export const setOffer = command({
  name: 'offers.set',
  http: 'PUT /suppliers/{supplierId}/offers',
  summary: 'Set what a supplier asks for a part, under its code: multiple, minimum, lead time, price breaks.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({
    supplierId: id(),
    partId: id(),
    supplierCode: words(80),
    orderMultiple: z.number().int().min(1).max(1_000_000).default(1),
    minimumQuantity: z.number().int().min(1).max(1_000_000).default(1),
    leadTimeDays: z.number().int().min(0).max(730).nullable().default(null),
    breaks,
  }),
  output: z.object({ id: id() }),
  async run({ tx, actor, input, record }) {
    const { breaks: steps, ...fields } = input;
    const [from] = await tx
      .select({ id: supplier.id })
      .from(supplier)
      .where(and(eq(supplier.workshopId, actor.workshopId), eq(supplier.id, input.supplierId)))
      .for('update');
    if (!from) throw notFound('supplier');
    const [wanted] = await tx
      .select({ id: part.id })
      .from(part)
      .where(and(eq(part.workshopId, actor.workshopId), eq(part.id, input.partId)));
    if (!wanted) throw notFound('part');
    const [row] = await tx
      .insert(offer)
      .values({ ...fields, workshopId: actor.workshopId })
      .onConflictDoUpdate({
        target: [offer.workshopId, offer.supplierId, offer.supplierCode],
        set: {
          orderMultiple: fields.orderMultiple,
          minimumQuantity: fields.minimumQuantity,
          leadTimeDays: fields.leadTimeDays,
          retiredAt: null,
        },
        // A supplier's code names one part; another part under it is a mistake, not a change.
        setWhere: eq(offer.partId, fields.partId),
      })
      .returning({ id: offer.id });
    if (!row)
      throw new Refusal('conflict', `This supplier’s code ${input.supplierCode} already stands for another part.`);
    await tx.delete(offerBreak).where(and(eq(offerBreak.workshopId, actor.workshopId), eq(offerBreak.offerId, row.id)));
    await tx
      .insert(offerBreak)
      .values(steps.map((step) => ({ ...step, workshopId: actor.workshopId, offerId: row.id })));
    record(row.id, { supplierCode: input.supplierCode, breaks: steps });
    return row;
  },
});

export const listOffers = query({
  name: 'offers.list',
  http: 'GET /offers',
  summary: 'List offers, of a supplier or for a part, with their breaks.',
  roles: 'everyone',
  input: z.strictObject({ ...pageFields, supplierId: id().optional(), partId: id().optional() }),
  output: pageOf(
    z.object({
      id: id(),
      supplierId: id(),
      supplierName: z.string(),
      partId: id(),
      partName: z.string(),
      supplierCode: z.string(),
      currency: z.string(),
      orderMultiple: z.number().int(),
      minimumQuantity: z.number().int(),
      leadTimeDays: z.number().int(),
      breaks: z.array(z.object({ fromQuantity: z.number().int(), unitPrice: z.string() })),
    }),
  ),
  async run({ tx, actor, input }) {
    const found = await tx
      .select({
        id: offer.id,
        supplierId: supplier.id,
        supplierName: supplier.name,
        partId: part.id,
        partName: part.name,
        supplierCode: offer.supplierCode,
        currency: supplier.currency,
        orderMultiple: offer.orderMultiple,
        minimumQuantity: offer.minimumQuantity,
        leadTimeDays: sql<number>`coalesce(${offer.leadTimeDays}, ${supplier.leadTimeDays})`,
        breaks: sql<
          { fromQuantity: number; unitPrice: string }[]
        >`(select coalesce(json_agg(json_build_object('fromQuantity', b.from_quantity, 'unitPrice', trim_scale(b.unit_price)::text) order by b.from_quantity), '[]') from ${offerBreak} b where b.workshop_id = ${offer.workshopId} and b.offer_id = ${offer.id})`,
        total: sql<number>`count(*) over ()::int`,
      })
      .from(offer)
      .innerJoin(supplier, and(eq(supplier.workshopId, offer.workshopId), eq(supplier.id, offer.supplierId)))
      .innerJoin(part, and(eq(part.workshopId, offer.workshopId), eq(part.id, offer.partId)))
      .where(
        and(
          eq(offer.workshopId, actor.workshopId),
          isNull(offer.retiredAt),
          input.supplierId === undefined ? undefined : eq(offer.supplierId, input.supplierId),
          input.partId === undefined ? undefined : eq(offer.partId, input.partId),
        ),
      )
      .orderBy(asc(part.name), asc(supplier.name))
      .limit(input.size)
      .offset((input.page - 1) * input.size);
    return {
      rows: found.map(({ total: _, ...row }) => row),
      total: found[0]?.total ?? 0,
      page: input.page,
      size: input.size,
    };
  },
});

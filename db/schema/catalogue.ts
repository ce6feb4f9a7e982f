/** Parts as the workshop keeps them: the same facts that the reader understands in a line, as columns to match by. */
import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  doublePrecision,
  index,
  integer,
  numeric,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
} from 'drizzle-orm/pg-core';
import { at, createdAt, ownWorkshopOnly, rowId, workshopId } from './columns';

export const part = pgTable(
  'part',
  {
    workshopId: workshopId(),
    id: rowId(),
    /** The workshop's short name for it, such as `4k7 1 %` or `TL072CP`; what is printed on a bin. */
    name: text('name').notNull(),
    description: text('description').notNull().default(''),
    kind: text('kind').notNull(),
    /** Maker's part number as on the bag; null for plain values. */
    partNumber: text('part_number'),
    /** Id of the family in lib/electronics/families; null where the tables know none. */
    family: text('family'),
    /** Exact value in the SI unit beside it. */
    value: numeric('value'),
    unit: text('unit'),
    tolerancePercent: numeric('tolerance_percent', { mode: 'number' }),
    ratedVolts: numeric('rated_volts', { mode: 'number' }),
    ratedWatts: numeric('rated_watts', { mode: 'number' }),
    ratedAmperes: numeric('rated_amperes', { mode: 'number' }),
    dielectric: text('dielectric'),
    technology: text('technology'),
    taper: text('taper'),
    mounting: text('mounting'),
    package: text('package'),
    /** Mains or isolation part: never offered as, nor given, a stand-in. */
    safety: boolean('safety').notNull().default(false),
    /** What one unit of quantity is: a piece, a millimetre (wire) or a milligram (solder). */
    stockUnit: text('stock_unit').notNull().default('piece'),
    reorderPoint: integer('reorder_point'),
    reorderQuantity: integer('reorder_quantity'),
    /** Upper-case letters and digits of the part number; what spellings are compared by. */
    partKey: text('part_key').generatedAlwaysAs(sql`upper(regexp_replace(part_number, '[^A-Za-z0-9]', '', 'g'))`),
    /**
     * The value as a double: the index is on it because comparing `numeric` is not leakproof in PostgreSQL, so that under
     * row-level security an index on `value` itself is never used. Equal values are compared by `value` besides.
     */
    valueKey: doublePrecision('value_key').generatedAlwaysAs(sql`value::double precision`),
    version: integer('version').notNull().default(1),
    retiredAt: at('retired_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.workshopId, t.id] }),
    uniqueIndex('part_name_once').on(t.workshopId, t.name),
    check('part_value_has_unit', sql`(${t.value} is null) = (${t.unit} is null)`),
    check('part_value_not_negative', sql`${t.value} is null or ${t.value} >= 0`),
    check('part_stock_unit', sql`${t.stockUnit} in ('piece', 'mm', 'mg')`),
    check(
      'part_reorder',
      sql`(${t.reorderPoint} is null or ${t.reorderPoint} >= 0) and (${t.reorderQuantity} is null or ${t.reorderQuantity} > 0)`,
    ),
    // The three ways a line finds its part: by spelling, by family, by kind and exact value.
    index('part_by_key').on(t.workshopId, t.partKey),
    index('part_by_family').on(t.workshopId, t.family),
    index('part_by_value').on(t.workshopId, t.kind, t.valueKey),
    // The one field and the parts page search by any piece of the name or description.
    index('part_search').using(
      'gin',
      sql`(name || ' ' || coalesce(part_number, '') || ' ' || description) gin_trgm_ops`,
    ),
    ownWorkshopOnly(),
  ],
).enableRLS();

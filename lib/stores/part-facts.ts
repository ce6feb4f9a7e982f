/** A part as lists and drawings show it: enough for its name, what to look for on its body, and its cautions. */
import 'server-only';
import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { id } from '@/lib/api/fields';

export const partFacts = z.object({
  id: id(),
  name: z.string(),
  description: z.string(),
  kind: z.string(),
  partNumber: z.string().nullable(),
  family: z.string().nullable(),
  value: z.string().nullable(),
  unit: z.string().nullable(),
  tolerancePercent: z.number().nullable(),
  ratedVolts: z.number().nullable(),
  ratedWatts: z.number().nullable(),
  dielectric: z.string().nullable(),
  technology: z.string().nullable(),
  taper: z.string().nullable(),
  mounting: z.string().nullable(),
  package: z.string().nullable(),
  safety: z.boolean(),
  stockUnit: z.string(),
});
export type PartFacts = z.output<typeof partFacts>;

/** SQL that builds PartFacts from the part table under the given alias (our own text, never a person's). */
export const partFactsJson = (alias: 'p') =>
  sql.raw(`json_build_object('id', ${alias}.id, 'name', ${alias}.name, 'description', ${alias}.description, 'kind', ${alias}.kind, 'partNumber', ${alias}.part_number, 'family', ${alias}.family,
    'value', trim_scale(${alias}.value)::text, 'unit', ${alias}.unit, 'tolerancePercent', ${alias}.tolerance_percent::float8, 'ratedVolts', ${alias}.rated_volts::float8, 'ratedWatts', ${alias}.rated_watts::float8,
    'dielectric', ${alias}.dielectric, 'technology', ${alias}.technology, 'taper', ${alias}.taper, 'mounting', ${alias}.mounting, 'package', ${alias}.package, 'safety', ${alias}.safety, 'stockUnit', ${alias}.stock_unit)`);

/** A notice shown where the part is handled (lib/planning/part-cautions.ts). */
export const caution = z.object({ code: z.string(), level: z.enum(['danger', 'care']), says: z.string() });

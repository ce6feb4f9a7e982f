/** A part of the catalogue in the shape that the stand-in checks compare. Pure. */
import { z } from 'zod';
import { PART_KINDS, type PartSpec, UNITS } from '@/lib/electronics/part-spec';
import { fromDecimal } from '@/lib/electronics/quantity';
import { partSpecSchema } from './part-spec-schema';

/** The columns of `part` that checks need, as SQL gives them. */
export interface PartColumns {
  readonly name: string;
  readonly description: string;
  readonly kind: string;
  readonly partNumber: string | null;
  readonly family: string | null;
  /** Plain decimal text in the SI unit beside it. */
  readonly value: string | null;
  readonly unit: string | null;
  readonly tolerancePercent: number | null;
  readonly ratedVolts: number | null;
  readonly ratedWatts: number | null;
  readonly ratedAmperes: number | null;
  readonly dielectric: string | null;
  readonly technology: string | null;
  readonly taper: string | null;
  readonly mounting: string | null;
  readonly package: string | null;
}

/** Said in a description only, these still decide: gangs of a pot, safety classes. */
const DECIDING_WORDS = /\b(?:dual|stereo|tandem|quad|[24][- ]?gang|[XY][1-4]|mains|isolat\w+|fusible)\b/gi;

const kinds = z.enum(PART_KINDS);
const units = z.enum(UNITS);
const { dielectric, technology, taper, mounting } = partSpecSchema.shape;

/** Words that the catalogue has but the checks don't know count as not said, so that the checks ask instead of guessing. */
const known = <Schema extends z.ZodType>(schema: Schema, given: unknown): z.output<Schema> | null =>
  schema.safeParse(given).data ?? null;

export function partToSpec(part: PartColumns): PartSpec {
  const unit = known(units, part.unit);
  const said = part.description.match(DECIDING_WORDS) ?? [];
  return {
    kind: known(kinds, part.kind),
    value: part.value === null || unit === null ? null : fromDecimal(part.value, unit),
    tolerancePercent: part.tolerancePercent,
    ratedVolts: part.ratedVolts,
    ratedWatts: part.ratedWatts,
    ratedAmperes: part.ratedAmperes,
    dielectric: known(dielectric, part.dielectric),
    technology: known(technology, part.technology),
    taper: known(taper, part.taper),
    mounting: known(mounting, part.mounting),
    package: part.package,
    partNumber: part.partNumber,
    family: part.family,
    alternatives: [],
    fitted: true,
    doubts: [],
    text: [part.name, ...said].join(' '),
  };
}

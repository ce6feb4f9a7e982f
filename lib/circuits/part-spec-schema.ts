/** The understood part as it is kept in a line, checked when it comes back; and what a line's columns say of it. */
import { z } from 'zod';
import { PART_KINDS, type PartSpec, UNITS } from '@/lib/electronics/part-spec';
import { toDecimal } from '@/lib/electronics/quantity';

const DIELECTRICS = [
  'C0G',
  'X5R',
  'X6S',
  'X7R',
  'X7S',
  'X8R',
  'Y5V',
  'Y5U',
  'Z5U',
  'ceramic',
  'film',
  'polyester',
  'polypropylene',
  'polystyrene',
  'polycarbonate',
  'mica',
  'aluminium',
  'aluminium-bipolar',
  'polymer',
  'tantalum',
] as const;
const TAPERS = ['linear', 'log', 'reverse-log', 'letter-A', 'letter-B', 'letter-C', 'other'] as const;
const TECHNOLOGIES = [
  'carbon-film',
  'carbon-composition',
  'metal-film',
  'metal-oxide',
  'wirewound',
  'thick-film',
  'thin-film',
] as const;
const MOUNTINGS = ['through-hole', 'surface', 'panel'] as const;

export const partSpecSchema = z.object({
  kind: z.enum(PART_KINDS).nullable(),
  value: z.object({ significand: z.number().int(), exponent: z.number().int(), unit: z.enum(UNITS) }).nullable(),
  tolerancePercent: z.number().nullable(),
  ratedVolts: z.number().nullable(),
  ratedWatts: z.number().nullable(),
  ratedAmperes: z.number().nullable(),
  dielectric: z.enum(DIELECTRICS).nullable(),
  technology: z.enum(TECHNOLOGIES).nullable(),
  taper: z.enum(TAPERS).nullable(),
  mounting: z.enum(MOUNTINGS).nullable(),
  package: z.string().nullable(),
  partNumber: z.string().nullable(),
  family: z.string().nullable(),
  alternatives: z.array(z.string()).readonly(),
  fitted: z.boolean(),
  doubts: z.array(z.object({ code: z.string(), ask: z.string(), options: z.array(z.string()).readonly() })).readonly(),
  text: z.string(),
});

/** Words that tell parts apart though no field holds them: safety class, gangs, fusible. */
const TELLING_WORDS = /\b(?:[XY][1-4]|DUAL|STEREO|TANDEM|QUAD|[24]-?GANG|FUSIBLE|FLAMEPROOF|MAINS)\b/g;

/** Upper-case letters and digits: how spellings of one part number are compared (as part.part_key in the database). */
export const partKeyOf = (partNumber: string): string => partNumber.replace(/[^A-Za-z0-9]/g, '').toUpperCase();

/**
 * What decisions are remembered by: everything that was understood, in one canonical text. Texts that differ only in
 * spelling (`4k7`, `4.7 kΩ`) have one key; what was not understood is told apart by its text.
 */
export function specKeyOf(spec: PartSpec): string {
  const {
    kind,
    value,
    tolerancePercent,
    ratedVolts,
    ratedWatts,
    ratedAmperes,
    dielectric,
    technology,
    taper,
    mounting,
  } = spec;
  const words = spec.text.normalize('NFKC').toUpperCase();
  const named = spec.partNumber !== null || spec.family !== null || value !== null;
  return [
    kind ?? '?',
    value === null ? '' : `${value.significand}e${value.exponent} ${value.unit}`,
    ...[tolerancePercent, ratedVolts, ratedWatts, ratedAmperes].map((one) => one ?? ''),
    dielectric ?? '',
    technology ?? '',
    taper ?? '',
    mounting ?? '',
    spec.package ?? '',
    spec.partNumber === null ? (spec.family ?? '') : partKeyOf(spec.partNumber),
    named
      ? [...new Set(words.match(TELLING_WORDS) ?? [])].sort().join(' ')
      : words.replace(/\s+/g, ' ').trim().slice(0, 300),
  ].join('|');
}

/** The columns of a line that matching works on, all from the one spec. */
export function lineFactsOf(spec: PartSpec) {
  return {
    kind: spec.kind ?? 'other',
    text: spec.text,
    spec,
    partNumber: spec.partNumber,
    family: spec.family,
    value: spec.value === null ? null : toDecimal(spec.value),
    unit: spec.value === null ? null : spec.value.unit,
    specKey: specKeyOf(spec),
  };
}

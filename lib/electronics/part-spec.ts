/**
 * What a person's text says about one part: the shape that the reader, the catalogue, the matcher and the stand-in
 * checks share. It holds what was said, never what was guessed; a guess is a `Doubt`.
 */

export const PART_KINDS = [
  'resistor',
  'capacitor',
  'inductor',
  'potentiometer',
  'trimmer',
  'thermistor',
  'diode',
  'led',
  'transistor',
  'ic',
  'regulator',
  'crystal',
  'connector',
  'switch',
  'fuse',
  'transformer',
  'optocoupler',
  'hardware',
  'pcb',
  'other',
] as const;
export type PartKind = (typeof PART_KINDS)[number];

export const UNITS = ['ohm', 'farad', 'henry', 'hertz', 'volt', 'ampere', 'watt'] as const;
export type Unit = (typeof UNITS)[number];

/**
 * An exact decimal with its unit: `significand × 10^exponent`, normalised so that the significand (a safe integer,
 * at most 15 digits) does not end in 0; zero is `0 × 10^0`. Two quantities are equal when all three fields are.
 */
export interface Quantity {
  readonly significand: number;
  readonly exponent: number;
  readonly unit: Unit;
}

/** How a capacitor is made; `ceramic` and `film` where the text says no more. */
export type Dielectric =
  | 'C0G'
  | 'X5R'
  | 'X6S'
  | 'X7R'
  | 'X7S'
  | 'X8R'
  | 'Y5V'
  | 'Y5U'
  | 'Z5U'
  | 'ceramic'
  | 'film'
  | 'polyester'
  | 'polypropylene'
  | 'polystyrene'
  | 'polycarbonate'
  | 'mica'
  | 'aluminium'
  | 'aluminium-bipolar'
  | 'polymer'
  | 'tantalum';

/** The letter or word as written; what it means depends on the convention (see facts on tapers). */
export type Taper = 'linear' | 'log' | 'reverse-log' | 'letter-A' | 'letter-B' | 'letter-C' | 'other';

export type ResistorTechnology =
  | 'carbon-film'
  | 'carbon-composition'
  | 'metal-film'
  | 'metal-oxide'
  | 'wirewound'
  | 'thick-film'
  | 'thin-film';

export type Mounting = 'through-hole' | 'surface' | 'panel';

/** Something a person must settle, in a builder's words, with the readings offered (each a text the reader reads plainly). */
export interface Doubt {
  readonly code: string;
  readonly ask: string;
  readonly options: readonly string[];
}

export interface PartSpec {
  readonly kind: PartKind | null;
  readonly value: Quantity | null;
  /** ±percent as written; null where the text says none. */
  readonly tolerancePercent: number | null;
  /** Rated voltage in volts, rated power in watts, rated current in amperes. */
  readonly ratedVolts: number | null;
  readonly ratedWatts: number | null;
  readonly ratedAmperes: number | null;
  readonly dielectric: Dielectric | null;
  readonly technology: ResistorTechnology | null;
  readonly taper: Taper | null;
  readonly mounting: Mounting | null;
  /** Case as the trade writes it: `DIP-14`, `SO-8`, `TO-92`, `0805`, `DO-35`; null where not said. */
  readonly package: string | null;
  /** As written, without alternatives or remarks; null for a plain value. */
  readonly partNumber: string | null;
  /** Id of the family in lib/electronics/families, such as `4093`, `tl072`, `bc547`; null where none is known. */
  readonly family: string | null;
  readonly alternatives: readonly string[];
  readonly fitted: boolean;
  readonly doubts: readonly Doubt[];
  /** The text that was read, untouched. */
  readonly text: string;
}

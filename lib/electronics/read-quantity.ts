/**
 * Values as people write them: 4k7, n47, 100R, 4,7 kΩ, .1uF, 104, 22.0uF, 600Ω. What a text can mean depends on the
 * kind of part; where it can mean two things, the likelier is given with a doubt that asks.
 */
import type { Doubt, PartKind, Quantity, Unit } from './part-spec';
import { printQuantity } from './print-quantity';
import { fromDecimal, quantity, QuantityError } from './quantity';

export interface ReadQuantity {
  readonly quantity: Quantity;
  /** From a letter after the value (4K7J), ±percent; IEC 60062. */
  readonly tolerancePercent: number | null;
  readonly doubts: readonly Doubt[];
}

/** The unit that a bare number of this kind is in; null where a bare number says nothing. */
export function unitOfKind(kind: PartKind | null): Unit | null {
  switch (kind) {
    case 'resistor':
    case 'potentiometer':
    case 'trimmer':
    case 'thermistor':
      return 'ohm';
    case 'capacitor':
      return 'farad';
    case 'inductor':
      return 'henry';
    case 'crystal':
      return 'hertz';
    default:
      return null;
  }
}

const POWERS: Readonly<Record<string, number>> = { f: -15, p: -12, n: -9, u: -6, m: -3, R: 0, E: 0, F: 0, k: 3, K: 3, M: 6, G: 9, T: 12, '': 0 };
const TOLERANCES: Readonly<Record<string, number>> = { B: 0.1, C: 0.25, D: 0.5, F: 1, G: 2, J: 5, K: 10, M: 20 };

/** One spelling for look-alikes: full-width forms, micro signs, ohm signs, decimal commas, words for units. */
export function tidyValueText(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/[\u00a0\u2007\u2009\u202f]/g, ' ')
    .replace(/[µμ]/g, 'u')
    .replace(/\u2126|\u03a9|\u03c9/g, 'Ω')
    .replace(/\b(k|K|M|G|m)?\s*ohms?\b/gi, (_, prefix: string | undefined) => `${prefix ?? ''}Ω`)
    .replace(/\bmfd\b/gi, 'uF')
    .replace(/\bmmfd\b|\buuf\b/gi, 'pF')
    .trim();
}

/** Thousands separators and decimal commas to a plain decimal; null where it is no number. */
function plainNumber(text: string): string | null {
  if (/^\d{1,3}(?:,\d{3})+(?:\.\d+)?$/.test(text)) return text.replaceAll(',', '');
  if (/^\d{1,3}(?:\.\d{3}){2,}(?:,\d+)?$/.test(text)) return text.replaceAll('.', '').replace(',', '.');
  const plain = text.replace(',', '.');
  return /^(?:\d+\.?\d*|\.\d+)$/.test(plain) ? plain : null;
}

const UNIT_SYMBOLS: readonly (readonly [RegExp, Unit])[] = [
  [/^(?:Ω|Ohm)$/i, 'ohm'],
  [/^F$/, 'farad'],
  [/^f$/, 'farad'],
  [/^H$/i, 'henry'],
  [/^Hz$/i, 'hertz'],
];

const NUMBER = String.raw`\d{1,3}(?:[.,]\d{3})+(?:[.,]\d+)?|\d+(?:[.,]\d*)?|[.,]\d+`;
/** 4.7 kΩ, 100nF, 10 K, 0.1u, 22.0uF, 4u7F is below. Groups: number, prefix, unit, tolerance letter. */
const PLAIN = new RegExp(`^(${NUMBER})\\s*([fpnumkKMGTRE]?)\\s*(Ω|F|f|H|h|Hz|HZ|hz)?\\s*([BCDFGJKM])?$`);
/** 4k7, n47, R47, 1M5, 4u7F, 2n2f, 4R7, 4E7, 47K3, with a tolerance letter after (4K7J). */
const CODED = /^(\d{0,4})([fpnumkKMGRE])(\d{1,4})\s*(Ω|F|f|H|h|Hz|HZ)?\s*([BCDFGJKM])?$/;
const UPPER_CODED = /^(\d{0,4})([PNU])(\d{1,4})?(F)?$/;
const DIGIT_CODE = /^(\d{2})(\d)([BCDFGJKMZ])?$/;
const EXPONENT = /^(\d+(?:\.\d+)?)[eE]([+-]?\d{1,2})$/;

/**
 * Reads a value text for a kind of part. Null where it is no value (a part number, words). Never throws.
 * @param text one value without ratings, such as `4k7` or `100 nF`
 */
export function readQuantity(text: string, kind: PartKind | null): ReadQuantity | null {
  const tidy = tidyValueText(text);
  if (tidy === '' || tidy.length > 40) return null;
  try {
    return readTidy(tidy, kind);
  } catch (error) {
    if (error instanceof QuantityError) return null;
    throw error;
  }
}

function readTidy(text: string, kind: PartKind | null): ReadQuantity | null {
  const home = unitOfKind(kind);
  // 33r and 4r7 in lower case, as lists of resistors have them.
  if (home === 'ohm' && /^\d*r\d*$/.test(text)) return readTidy(text.replace('r', 'R'), kind);
  return readPlain(text, kind, home) ?? readCoded(text, kind, home) ?? readUpperCoded(text, home) ?? readExponent(text, home);
}

function readPlain(text: string, kind: PartKind | null, home: Unit | null): ReadQuantity | null {
  const form = PLAIN.exec(text);
  if (!form) return null;
  const [, number = '', prefix = '', symbol, letter] = form;
  const said = symbol === undefined ? null : (UNIT_SYMBOLS.find(([pattern]) => pattern.test(symbol))?.[1] ?? null);
  const unit = unitFor(said, prefix, home);
  if (unit === null) return null;
  if (prefix === '' && said === null && unit === 'farad') return readBareCapacitance(number, letter, text);
  const decimal = plainNumber(number);
  if (decimal === null) return null;
  const { power, doubts } = powerOf(prefix, unit, decimal, text, kind);
  if (power === null) return null;
  const base = fromDecimal(decimal, unit);
  return { quantity: quantity(base.significand, base.exponent + power, unit), tolerancePercent: toleranceOf(letter, unit), doubts };
}

/** An ohm sign wins over the kind (a ferrite bead is given in ohms); a prefix that the unit never has gives null. */
function unitFor(said: Unit | null, prefix: string, home: Unit | null): Unit | null {
  if (said !== null) {
    if (said === 'farad' && home === 'ohm') return null;
    return said;
  }
  if (home !== null) {
    if ((prefix === 'R' || prefix === 'E') && home !== 'ohm') return home === 'farad' && prefix === 'R' ? 'farad' : home === 'henry' ? 'ohm' : null;
    if ((prefix === 'p' || prefix === 'n' || prefix === 'u') && home === 'ohm') return null;
    if ((prefix === 'k' || prefix === 'K' || prefix === 'G') && home === 'farad') return null;
    return home;
  }
  if (prefix === 'R' || prefix === 'k' || prefix === 'K' || prefix === 'G') return 'ohm';
  if (prefix === 'p' || prefix === 'n' || prefix === 'u') return 'farad';
  if (prefix === 'M') return 'ohm';
  return null;
}

function powerOf(prefix: string, unit: Unit, decimal: string, text: string, kind: PartKind | null): { power: number | null; doubts: Doubt[] } {
  // People type m for mega on resistors; milliohms are shunts and rare in the trade (common practice).
  if (prefix === 'm' && unit === 'ohm') {
    const mega = scaled(decimal, 6, unit);
    const milli = scaled(decimal, -3, unit);
    const ask: Doubt = { code: 'mega-or-milli', ask: `“${text}” on a ${kind ?? 'resistor'}: milliohm, or mega as people often type it?`, options: [printQuantity(mega), printQuantity(milli)] };
    return { power: 6, doubts: [ask] };
  }
  if (prefix === 'M' && unit === 'farad') return { power: -6, doubts: [{ code: 'micro-or-milli', ask: `“${text}” on a capacitor: microfarad?`, options: [printQuantity(scaled(decimal, -6, unit)), printQuantity(scaled(decimal, -3, unit))] }] };
  if (prefix === 'm' && unit === 'farad' && Number(decimal) >= 1) {
    return { power: -3, doubts: [{ code: 'micro-or-milli', ask: `“${text}” on a capacitor: millifarad as written, or microfarad?`, options: [printQuantity(scaled(decimal, -6, unit)), printQuantity(scaled(decimal, -3, unit))] }] };
  }
  // A body mark: R is the decimal point of picofarads (IEC 60062).
  if (prefix === 'R' && unit === 'farad') return { power: -12, doubts: [] };
  const power = POWERS[prefix];
  return { power: power ?? null, doubts: [] };
}

function scaled(decimal: string, power: number, unit: Unit): Quantity {
  const base = fromDecimal(decimal, unit);
  return quantity(base.significand, base.exponent + power, unit);
}

/** `104`, `.1`, `100`, `1000`, `4.7` on a capacitor, with nothing beside it. */
function readBareCapacitance(number: string, letter: string | undefined, text: string): ReadQuantity | null {
  const code = DIGIT_CODE.exec(number);
  if (code && Number(code[2]) !== 0 && Number(code[2]) !== 7) {
    const exponent = Number(code[2]);
    // EIA: 8 stands for ×0.01 and 9 for ×0.1.
    const power = exponent === 8 ? -2 : exponent === 9 ? -1 : exponent;
    return { quantity: quantity(Number(code[1]), power - 12, 'farad'), tolerancePercent: letter === undefined ? null : (TOLERANCES[letter] ?? null), doubts: [] };
  }
  const decimal = plainNumber(number);
  if (decimal === null) return null;
  if (Number(decimal) === 0) return null;
  if (decimal.includes('.') || Number(decimal) < 10) {
    const micro = scaled(decimal, -6, 'farad');
    return { quantity: micro, tolerancePercent: null, doubts: [{ code: 'bare-capacitance', ask: `“${text}” on a capacitor has no unit: microfarad, as on a schematic?`, options: [printQuantity(micro), printQuantity(scaled(decimal, -12, 'farad'))] }] };
  }
  const pico = scaled(decimal, -12, 'farad');
  return { quantity: pico, tolerancePercent: null, doubts: [{ code: 'bare-capacitance', ask: `“${text}” on a capacitor has no unit: picofarad, as on a schematic?`, options: [printQuantity(pico), printQuantity(scaled(decimal, -6, 'farad'))] }] };
}

function readCoded(text: string, kind: PartKind | null, home: Unit | null): ReadQuantity | null {
  const form = CODED.exec(text);
  if (!form) return null;
  const [, whole = '', prefix = '', fraction = '', symbol, letter] = form;
  const said = symbol === undefined ? null : (UNIT_SYMBOLS.find(([pattern]) => pattern.test(symbol))?.[1] ?? null);
  const unit = unitFor(said, prefix, home);
  if (unit === null) return null;
  // A bare E12 is no value; 4E7 is (E informal for R).
  if (prefix === 'E' && (whole === '' || unit !== 'ohm')) return null;
  const decimal = `${whole === '' ? '0' : whole}.${fraction}`;
  const { power, doubts } = powerOf(prefix, unit, decimal, text, kind);
  if (power === null) return null;
  return { quantity: scaled(decimal, power, unit), tolerancePercent: toleranceOf(letter, unit), doubts };
}

/** 100N, 10U, 47P, 4U7, 100NF from lists typed in capitals; only where nothing else is meant. */
function readUpperCoded(text: string, home: Unit | null): ReadQuantity | null {
  const form = UPPER_CODED.exec(text) ?? /^(\d+(?:[.,]\d+)?)([PNU])()(F)?$/.exec(text);
  if (!form) return null;
  const [, whole = '', prefix = '', fraction = '', farad] = form;
  if (home !== 'farad' && home !== 'henry' && farad === undefined) return null;
  if (whole === '' && fraction === '') return null;
  const unit: Unit = home === 'henry' && farad === undefined ? 'henry' : 'farad';
  const decimal = fraction === '' ? plainNumber(whole) : `${whole === '' ? '0' : whole}.${fraction}`;
  const power = POWERS[prefix.toLowerCase()];
  if (decimal === null || power === undefined) return null;
  return { quantity: scaled(decimal, power, unit), tolerancePercent: null, doubts: [] };
}

/** 1e5 and 4.7E-06: what spreadsheets make of numbers. */
function readExponent(text: string, home: Unit | null): ReadQuantity | null {
  const form = EXPONENT.exec(text);
  if (!form || home === null) return null;
  return { quantity: fromDecimal(text, home), tolerancePercent: null, doubts: [] };
}

function toleranceOf(letter: string | undefined, unit: Unit): number | null {
  if (letter === undefined || (unit !== 'ohm' && unit !== 'farad')) return null;
  return TOLERANCES[letter] ?? null;
}

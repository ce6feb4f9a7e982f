/**
 * Values as people write them: 4k7, n47, 100R, 4,7 kΩ, .1uF, 104, 22.0uF, 600Ω. What a text can mean depends on the
 * kind of part; where it can mean two things, the likelier is given with a doubt that asks. Ratings, packages and words
 * beside the value are left to readPartText.
 */
import { readBareNumber, readDigitCode, scaled } from './bare-number';
import { doubtBetween } from './doubt-between';
import { tolerancePercentOf } from './markings/tolerance-letters';
import { UNITS, type Doubt, type PartKind, type Quantity, type Unit } from './part-spec';
import { printQuantity } from './print-quantity';
import { fromDecimal, QuantityError, toNumber } from './quantity';
import { readNumber, type ReadNumber } from './read-number';
import { tidyValueText } from './tidy-value-text';
import { readUnitWord, type UnitWord } from './unit-words';

export interface ReadQuantity {
  readonly quantity: Quantity;
  /** From a letter after the value (4K7J), ±percent; IEC 60062. Null for lopsided letters such as Z. */
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

const LONGEST_TEXT = 40;
const UNIT_SET: ReadonlySet<string> = new Set(UNITS);

/**
 * Reads one value text. Null where it is no value (a part number, words, nothing). Never throws.
 *
 * @param text one value without ratings, such as `4k7` or `100 nF`
 * @param hint the kind of part or the unit expected; null where only the text can tell
 */
export function readQuantity(text: string, hint: PartKind | Unit | null): ReadQuantity | null {
  const tidy = tidyValueText(text);
  if (tidy === '' || tidy.length > LONGEST_TEXT) return null;
  const context: Context = {
    text: tidy,
    home: isUnit(hint) ? hint : unitOfKind(hint),
    codesUsual: hint === 'trimmer' || hint === 'potentiometer',
  };
  try {
    return readExponent(context) ?? readMarkedCode(context) ?? readPlain(context) ?? readLetterForPoint(context);
  } catch (error) {
    // Too many digits or beyond any part: no value.
    if (error instanceof QuantityError) return null;
    throw error;
  }
}

interface Context {
  readonly text: string;
  readonly home: Unit | null;
  /** Trimmers and potentiometers are listed by the code on their body. */
  readonly codesUsual: boolean;
}

function isUnit(hint: PartKind | Unit | null): hint is Unit {
  return hint !== null && UNIT_SET.has(hint);
}

/** `1E+05` and `4.7e-06`: what spreadsheets make of numbers. Without a sign, a capital E is the decimal point of ohms. */
function readExponent({ text, home }: Context): ReadQuantity | null {
  const form = /^(\d+(?:[.,]\d+)?)(?:[eE]([+-]\d{1,2})|e(\d{1,2}))$/.exec(text);
  if (form === null || home === null) return null;
  return finished(
    fromDecimal(`${(form[1] ?? '').replace(',', '.')}e${form[2] ?? form[3] ?? '0'}`, home),
    undefined,
    [],
  );
}

/** `104K`, `473J`, `220K` on a capacitor: the code with its tolerance letter, as printed on the part. */
function readMarkedCode({ text, home }: Context): ReadQuantity | null {
  const form = home === 'farad' ? /^([1-9]\d)([0-689])([BCDFGHJKMZ])$/.exec(text) : null;
  if (form === null) return null;
  const [, figures = '', last = '', letter = ''] = form;
  const code = readDigitCode(figures + last, -12, 'farad');
  if (code === null) return null;
  if (last !== '0') return finished(code, letter, []);
  if (letter === 'F' || letter === 'M') return null;
  const others =
    letter === 'K' ? [code, scaled(figures + last, -9, 'farad')] : [code, scaled(figures + last, -12, 'farad')];
  return finished(code, letter, [
    doubtBetween('code-or-number', text, 'The code printed on the part, or a plain number?', others),
  ]);
}

const PLAIN = /^([\d.,' ]*\d[.,]?)\s?([A-Za-zΩ]*)\s?([BCDFGJKMZ])?$/;
const TOLERANCE_END = /[BCDFGJKMZ]$/;

/** `4.7 kΩ`, `100nF`, `10 K`, `0.1u`, `22.0uF`, `4700`, `10kJ`, `100 nF J`. */
function readPlain(context: Context): ReadQuantity | null {
  const form = PLAIN.exec(context.text);
  const number = form === null ? null : readNumber((form[1] ?? '').trim());
  if (form === null || number === null) return null;
  const [, , word = '', apart] = form;
  if (word === '' && apart === undefined) return readBare(context, number, undefined);
  const whole = readUnitWord(word === '' ? (apart ?? '') : word, context.home);
  if (whole !== null) return withUnit(context, number, whole, word === '' ? undefined : apart);
  if (word === '') return readKiloOnCapacitor(context, number.decimal, apart ?? '');
  if (apart === undefined && TOLERANCE_END.test(word)) {
    const letter = word.slice(-1);
    const unit = word.length === 1 ? null : readUnitWord(word.slice(0, -1), context.home);
    if (unit !== null) return withUnit(context, number, unit, letter);
  }
  return readKiloOnCapacitor(context, number.decimal, word);
}

function readBare(
  { text, home, codesUsual }: Context,
  number: ReadNumber,
  letter: string | undefined,
): ReadQuantity | null {
  if (home === null) return null;
  const bare = readBareNumber(number, text, home === 'ohm' && codesUsual ? 'trimmer' : home);
  return bare === null ? null : finished(bare.quantity, letter, bare.doubts);
}

function withUnit(
  { text }: Context,
  number: ReadNumber,
  word: UnitWord,
  letter: string | undefined,
): ReadQuantity | null {
  const { unit } = word;
  if (Number(number.decimal) === 0 && unit !== 'ohm') return null;
  const read = scaled(number.decimal, word.exponent, unit);
  if (number.asThousands !== null && maybeThousands(word, number)) {
    const thousands = scaled(number.asThousands, word.exponent, unit);
    return finished(thousands, letter, [
      doubtBetween('thousands-or-decimal', text, 'Thousands, or a decimal mark?', [thousands, read]),
    ]);
  }
  if (word.otherExponent !== null) {
    const other = scaled(number.decimal, word.otherExponent, unit);
    return finished(read, letter, [unit === 'ohm' ? megaOrMilli(text, read, other) : microOrMilli(text, read, other)]);
  }
  return finished(read, letter, []);
}

/** Nobody writes 4,700 kΩ for 4.7 MΩ, nor thousands of megahertz; thousands of pF, µF and ohms are common. */
function maybeThousands({ unit, exponent }: UnitWord, { separator }: ReadNumber): boolean {
  if (unit === 'hertz' || exponent >= 3 || exponent === -3) return false;
  return separator === ',' || exponent === 0 || exponent === -12;
}

function megaOrMilli(text: string, mega: Quantity, milli: Quantity): Doubt {
  return doubtBetween('mega-or-milli', text, 'Milliohm, or mega as people often type it?', [mega, milli]);
}

function microOrMilli(text: string, read: Quantity, other: Quantity): Doubt {
  return doubtBetween('micro-or-milli', text, 'Microfarad, as old drawings write it, or thousands of microfarads?', [
    read,
    other,
  ]);
}

/** `10k` on a capacitor: kilo-picofarad on old European drawings, or a resistor in the wrong row. */
function readKiloOnCapacitor({ text, home }: Context, decimal: string, word: string): ReadQuantity | null {
  if (home !== 'farad' || (word !== 'k' && word !== 'K') || Number(decimal) === 0) return null;
  const nano = scaled(decimal, -9, 'farad');
  const doubt: Doubt = {
    code: 'kilo-on-capacitor',
    ask: `“${text}”: thousands of picofarads, or is this a resistor?`,
    options: [printQuantity(nano), `resistor ${printQuantity(scaled(decimal, 3, 'ohm'))}`],
  };
  return finished(nano, undefined, [doubt]);
}

const LETTER_FOR_POINT = /^(\d{0,4})([A-Za-zΩ])(\d{1,4})\s?(ohms?|Ω|F|f|H|h|Hz|HZ|hz|V|R)?\s?([BCDFGJKMZ])?$/;

/** `4k7`, `n47`, `R47`, `1M5`, `4u7F`, `2n2f`, `4E7`, `47K3`, `5V1`, with a tolerance letter after (`4K7J`). */
function readLetterForPoint(context: Context): ReadQuantity | null {
  const form = LETTER_FOR_POINT.exec(context.text);
  if (form === null) return null;
  const [, whole = '', letter = '', fraction = '', name = '', tolerance] = form;
  if (!plausibleLetterCode(context.home, whole, letter, fraction, name)) return null;
  const decimal = `${whole === '' ? '0' : whole}.${fraction}`;
  const word = letterAsPoint(context.home, letter, name);
  const read =
    word === null
      ? readKiloOnCapacitor(context, decimal, letter)
      : withUnit(context, { decimal, asThousands: null, separator: null }, word, tolerance);
  if (read === null) return null;
  if (context.home === null && whole === '' && letter === 'R') {
    const ask = `“${context.text}”: a value, or resistor number ${fraction}?`;
    return {
      ...read,
      doubts: [...read.doubts, { code: 'value-or-designator', ask, options: [printQuantity(read.quantity)] }],
    };
  }
  return read;
}

/** Keeps `1N4148`, `2n2222`, `K3020` and `U12` from being read as values. */
function plausibleLetterCode(
  home: Unit | null,
  whole: string,
  letter: string,
  fraction: string,
  name: string,
): boolean {
  const isPoint = letter === 'R' || letter === 'r';
  if (fraction.length > 3 && !(isPoint && whole.length <= 1)) return false;
  if (home !== null) return !(/[nN]/.test(letter) && fraction.length > 2 && /^[12]$/.test(whole));
  if (name !== '') return true;
  if (whole === '' && !/[npuR]/.test(letter)) return false;
  // Diodes and transistors registered as 1N… and 2N…: two figures or more are their number.
  return !(letter === 'n' && /^[12]$/.test(whole) && fraction.length > 1);
}

function letterAsPoint(home: Unit | null, letter: string, name: string): UnitWord | null {
  const point = (unit: Unit, exponent: number): UnitWord => ({ unit, exponent, named: false, otherExponent: null });
  if (letter === 'Ω') return point('ohm', 0);
  if (letter === 'L' && home === 'ohm') return point('ohm', -3);
  if (/^[Rr]$/.test(letter)) {
    // On small capacitors and inductors R is the decimal point of pF and µH (IEC 60062 and body marks).
    if (home === 'farad') return point('farad', -12);
    if (home === 'henry') return point('henry', -6);
    return home === 'ohm' || (home === null && letter === 'R') ? point('ohm', 0) : null;
  }
  if (letter === 'V' && (home === 'volt' || home === null)) return point('volt', 0);
  if (letter === 'F' && home === 'farad') return point('farad', 0);
  if (letter === 'H' && home === 'henry') return point('henry', 0);
  if (letter === 'A' && home === 'ampere') return point('ampere', 0);
  if (letter === 'W' && home === 'watt') return point('watt', 0);
  const named = name === '' || name === 'R' ? null : readUnitWord(letter + name, home);
  if (named !== null) return named;
  return name === '' || name === 'R' || name === 'V' ? readUnitWord(letter, home) : null;
}

function finished(read: Quantity, letter: string | undefined, doubts: readonly Doubt[]): ReadQuantity {
  const picofarads = read.unit === 'farad' ? toNumber(read) * 1e12 : null;
  const takesLetter = letter !== undefined && (read.unit === 'ohm' || read.unit === 'farad' || read.unit === 'henry');
  return { quantity: read, tolerancePercent: takesLetter ? tolerancePercentOf(letter, picofarads) : null, doubts };
}

/**
 * Numbers without a unit, whose meaning the kind of part decides: `104` on a capacitor is a code, `4700` on a resistor is
 * ohms, `.1` on a capacitor is µF by habit. Where two readings are in use the likelier is given with a doubt.
 */
import { doubtBetween } from './doubt-between';
import type { Doubt, Quantity, Unit } from './part-spec';
import { isPreferred } from './preferred-values';
import { fromDecimal, quantity } from './quantity';
import type { ReadNumber } from './read-number';

export interface BareReading {
  readonly quantity: Quantity;
  readonly doubts: readonly Doubt[];
}

/** How digits alone are printed on the part: `chip` codes on resistors, or a trimmer, whose codes are usual in lists too. */
export type BareUse = Unit | 'trimmer';

/**
 * @param number as readNumber gave it
 * @param text the text as typed, for the question
 * @returns null where a bare number says nothing about such a part
 */
export function readBareNumber(number: ReadNumber, text: string, use: BareUse): BareReading | null {
  switch (use) {
    case 'ohm':
      return readBareResistance(number, text, false);
    case 'trimmer':
      return readBareResistance(number, text, true);
    case 'farad':
      return readBareCapacitance(number, text);
    case 'henry':
      return readBareInductance(number, text);
    case 'hertz':
      return readBareFrequency(number, text);
    case 'volt':
    case 'ampere':
    case 'watt':
      return plainly(fromDecimal(number.decimal, use));
  }
}

const plainly = (read: Quantity): BareReading => ({ quantity: read, doubts: [] });

/**
 * Three figures in pF, µH or Ω: two digits and a power of ten. On capacitors 8 and 9 stand for ×0.01 and ×0.1 and 7 is
 * not used (EIA). Null where the digits are no such code.
 */
export function readDigitCode(digits: string, baseExponent: number, unit: Unit): Quantity | null {
  if (!/^[1-9]\d{2,3}$/.test(digits)) return null;
  const figures = Number(digits.slice(0, -1));
  const last = Number(digits.slice(-1));
  if (unit === 'farad' && last === 7) return null;
  const power = unit === 'farad' && last === 8 ? -2 : unit === 'farad' && last === 9 ? -1 : last;
  return quantity(figures, baseExponent + power, unit);
}

function readBareResistance(number: ReadNumber, text: string, codesUsual: boolean): BareReading {
  if (number.asThousands !== null) {
    const options = [fromDecimal(number.asThousands, 'ohm'), fromDecimal(number.decimal, 'ohm')] as const;
    return {
      quantity: options[0],
      doubts: [doubtBetween('thousands-or-decimal', text, 'Thousands, or a decimal mark?', options)],
    };
  }
  const plain = fromDecimal(number.decimal, 'ohm');
  const last = number.decimal.slice(-1);
  if (!/^[1-9]\d{2,3}$/.test(number.decimal) || last < '1' || last > '6') return plainly(plain);
  const code = readDigitCode(number.decimal, 0, 'ohm');
  if (code === null) return plainly(plain);
  if (codesUsual && number.decimal.length === 3) return plainly(code);
  const codeIsPreferred = isPreferred(code, 'E24') || (number.decimal.length === 4 && isPreferred(code, 'E96'));
  if (!codeIsPreferred) return plainly(plain);
  const codeFirst = !isPreferred(plain, 'E96') && !isPreferred(plain, 'E24');
  const options = codeFirst ? ([code, plain] as const) : ([plain, code] as const);
  return {
    quantity: options[0],
    doubts: [doubtBetween('code-or-ohms', text, 'The code printed on the part, or plain ohms?', options)],
  };
}

function readBareCapacitance(number: ReadNumber, text: string): BareReading | null {
  const { decimal } = number;
  if (/^0*(?:\.0*)?$/.test(decimal)) return null;
  const micro = scaled(decimal, -6, 'farad');
  const pico = scaled(decimal, -12, 'farad');
  const ask = (options: readonly [Quantity, ...Quantity[]], question: string): BareReading => ({
    quantity: options[0],
    doubts: [doubtBetween('bare-capacitance', text, question, options)],
  });
  if (number.asThousands !== null)
    return ask([micro, scaled(number.asThousands, -12, 'farad')], 'Which unit is meant?');
  if (decimal.includes('.')) return ask([micro, pico], 'No unit: microfarad, as drawings without units mean it?');
  const code = readDigitCode(decimal, -12, 'farad');
  if (decimal.length === 3 && code !== null) {
    const last = decimal.slice(-1);
    if (last >= '1' && last <= '6') return plainly(code);
    if (last === '0') return ask([pico, code, micro], 'No unit: picofarad, the code on the part, or microfarad?');
    return ask([code, pico], 'The code printed on the part, or picofarad?');
  }
  if (decimal.length === 4 && code !== null && !decimal.endsWith('0')) {
    return ask([code, pico], 'The code printed on the part, or picofarad?');
  }
  return ask([pico, micro], 'No unit: picofarad or microfarad?');
}

function readBareInductance(number: ReadNumber, text: string): BareReading {
  const micro = scaled(number.decimal, -6, 'henry');
  const milli = scaled(number.decimal, -3, 'henry');
  const code = readDigitCode(number.decimal, -6, 'henry');
  const last = number.decimal.slice(-1);
  const isCode = code !== null && number.decimal.length === 3;
  if (isCode && last >= '1' && last <= '6') return plainly(code);
  const options: readonly [Quantity, ...Quantity[]] = isCode && last === '0' ? [micro, code, milli] : [micro, milli];
  return { quantity: micro, doubts: [doubtBetween('bare-inductance', text, 'No unit: which is meant?', options)] };
}

function readBareFrequency(number: ReadNumber, text: string): BareReading {
  const mega = scaled(number.decimal, 6, 'hertz');
  const kilo = scaled(number.decimal, 3, 'hertz');
  // 32.768 is the watch crystal, in kilohertz; other bare numbers on crystals are megahertz (common practice).
  const options = number.decimal === '32.768' ? ([kilo, mega] as const) : ([mega, kilo] as const);
  return { quantity: options[0], doubts: [doubtBetween('bare-frequency', text, 'No unit: which is meant?', options)] };
}

export function scaled(decimal: string, power: number, unit: Unit): Quantity {
  const base = fromDecimal(decimal, unit);
  return quantity(base.significand, base.exponent + power, unit);
}

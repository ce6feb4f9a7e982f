/**
 * Exact decimals with a unit: a significand and a power of ten, so that 4k7, 4.7K and 4700 are one value. Floats appear
 * only where a formula needs them (toNumber).
 */
import type { Quantity, Unit } from './part-spec';

/** A number or text that is no quantity: which and why. */
export class QuantityError extends Error {
  readonly given: string;
  constructor(given: string, why: string) {
    super(`${given}: ${why}`);
    this.name = 'QuantityError';
    this.given = given;
  }
}

const MOST_DIGITS = 15;
const LARGEST_EXPONENT = 30;

/** Normalised: the significand does not end in 0. Throws QuantityError above 15 digits, or outside 10^±30. */
export function quantity(significand: number, exponent: number, unit: Unit): Quantity {
  if (!Number.isSafeInteger(significand) || !Number.isInteger(exponent)) throw new QuantityError(`${significand}e${exponent}`, 'is not a whole significand and power of ten');
  if (significand === 0) return { significand: 0, exponent: 0, unit };
  let digits = significand;
  let power = exponent;
  while (digits % 10 === 0) {
    digits /= 10;
    power += 1;
  }
  if (String(Math.abs(digits)).length > MOST_DIGITS) throw new QuantityError(String(significand), `has more than ${MOST_DIGITS} digits`);
  if (Math.abs(power) > LARGEST_EXPONENT) throw new QuantityError(`${significand}e${exponent}`, 'is too large or too small for a part');
  return { significand: digits, exponent: power, unit };
}

/** From plain or exponent decimal text (`0.0000001`, `4.7e3`), exactly. Throws QuantityError. */
export function fromDecimal(text: string, unit: Unit): Quantity {
  const form = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,3}))?$/.exec(text.trim());
  const whole = form?.[2] ?? '';
  const fraction = form?.[3] ?? '';
  if (!form || whole + fraction === '') throw new QuantityError(text, 'is not a decimal number');
  const digits = (whole + fraction).replace(/^0+/, '');
  const trailing = /0*$/.exec(digits)?.[0].length ?? 0;
  const kept = digits.slice(0, digits.length - trailing);
  if (kept.length > MOST_DIGITS) throw new QuantityError(text, `has more than ${MOST_DIGITS} digits`);
  const sign = form[1] === '-' ? -1 : 1;
  return quantity(kept === '' ? 0 : sign * Number(kept), Number(form[4] ?? '0') - fraction.length + trailing, unit);
}

/** The nearest double, in the SI unit. */
export const toNumber = ({ significand, exponent }: Quantity): number => Number(`${significand}e${exponent}`);

/** Plain decimal text without an exponent, exact: for a numeric column. */
export function toDecimal({ significand, exponent }: Quantity): string {
  const sign = significand < 0 ? '-' : '';
  const digits = String(Math.abs(significand));
  if (exponent >= 0) return `${sign}${digits}${'0'.repeat(exponent)}`;
  const padded = digits.padStart(1 - exponent, '0');
  return `${sign}${padded.slice(0, exponent)}.${padded.slice(exponent)}`;
}

export const equalQuantity = (a: Quantity, b: Quantity): boolean => a.unit === b.unit && a.significand === b.significand && a.exponent === b.exponent;

/** Negative, zero or positive as a is less, equal or more. Throws QuantityError across units. */
export function compareQuantity(a: Quantity, b: Quantity): number {
  if (a.unit !== b.unit) throw new QuantityError(`${a.unit} and ${b.unit}`, 'can’t be compared');
  const power = Math.min(a.exponent, b.exponent);
  const left = BigInt(a.significand) * 10n ** BigInt(a.exponent - power);
  const right = BigInt(b.significand) * 10n ** BigInt(b.exponent - power);
  return left < right ? -1 : left > right ? 1 : 0;
}

/** a as a share of b, in percent above it: 1.5 means 1.5 % more. Throws QuantityError for b = 0 or across units. */
export function deviationPercent(a: Quantity, b: Quantity): number {
  if (a.unit !== b.unit || b.significand === 0) throw new QuantityError(`${a.unit} and ${b.unit}`, 'have no ratio');
  return (toNumber(a) / toNumber(b) - 1) * 100;
}

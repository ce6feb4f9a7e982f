/**
 * Exact decimals with a unit. Values that are compared or stored never pass through floats, so 4k7, 4.7K and 4700 are
 * one value and 0.1 µF is exactly 100 nF. Reading and printing texts are left to read-quantity.ts and print-quantity.ts.
 */
import type { Quantity, Unit } from './part-spec';

export type QuantityErrorCode = 'not-a-decimal' | 'too-long' | 'out-of-range' | 'unit-mismatch' | 'division-by-zero';

export class QuantityError extends Error {
  readonly code: QuantityErrorCode;
  constructor(code: QuantityErrorCode, message: string) {
    super(message);
    this.name = 'QuantityError';
    this.code = code;
  }
}

const LARGEST_SIGNIFICAND = 999_999_999_999_999;
/** Far beyond any part (pF to GΩ spans 1e-15 to 1e12); keeps `toDecimal` short enough for a numeric column. */
const LARGEST_EXPONENT = 30;

/**
 * @param significand an integer of at most 15 digits; negative values are allowed (volts below earth)
 * @param exponent power of ten, so that the value is `significand × 10^exponent` of the unit
 * @throws QuantityError `not-a-decimal` for a fraction, NaN or infinity, `too-long` beyond 15 digits, `out-of-range`
 *   where the normalised exponent leaves ±30
 */
export function quantity(significand: number, exponent: number, unit: Unit): Quantity {
  if (!Number.isInteger(significand) || !Number.isInteger(exponent)) {
    throw new QuantityError('not-a-decimal', `${significand} × 10^${exponent} is not an integer times a power of ten`);
  }
  if (Math.abs(significand) > LARGEST_SIGNIFICAND) {
    throw new QuantityError('too-long', `${significand} has more than 15 digits`);
  }
  if (significand === 0) return { significand: 0, exponent: 0, unit };
  let digits = significand;
  let power = exponent;
  while (digits % 10 === 0) {
    digits /= 10;
    power += 1;
  }
  if (Math.abs(power) > LARGEST_EXPONENT) {
    throw new QuantityError('out-of-range', `10^${power} is outside 10^-${LARGEST_EXPONENT} to 10^${LARGEST_EXPONENT}`);
  }
  return { significand: digits, exponent: power, unit };
}

/** The nearest float in SI units (Ω, F, H, Hz, V, A, W), for formulas; never for comparing or storing. */
export function toNumber(value: Quantity): number {
  return Number(`${value.significand}e${value.exponent}`);
}

/** Plain decimal digits without an exponent, such as `0.0000001` for 100 nF; what a PostgreSQL `numeric` takes and gives. */
export function toDecimal(value: Quantity): string {
  const sign = value.significand < 0 ? '-' : '';
  const digits = String(Math.abs(value.significand));
  if (value.exponent >= 0) return sign + digits + '0'.repeat(value.exponent);
  const places = -value.exponent;
  const padded = digits.padStart(places + 1, '0');
  return `${sign}${padded.slice(0, -places)}.${padded.slice(-places)}`;
}

/**
 * Reads a plain decimal as `toDecimal` or PostgreSQL writes it: digits with an optional point, sign or exponent.
 * What people type is for `readQuantity`.
 *
 * @throws QuantityError `not-a-decimal`, `too-long`, `out-of-range`
 */
export function fromDecimal(text: string, unit: Unit): Quantity {
  const form = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,3}))?$/.exec(text.trim());
  const whole = form?.[2] ?? '';
  const fraction = form?.[3] ?? '';
  if (form === null || whole + fraction === '') {
    throw new QuantityError('not-a-decimal', `"${text}" is not a plain decimal`);
  }
  const all = (whole + fraction).replace(/^0+/, '');
  const kept = all.replace(/0+$/, '');
  if (kept === '') return quantity(0, 0, unit);
  if (kept.length > 15) throw new QuantityError('too-long', `"${text}" has more than 15 significant digits`);
  const exponent = Number(form[4] ?? '0') - fraction.length + (all.length - kept.length);
  return quantity(form[1] === '-' ? -Number(kept) : Number(kept), exponent, unit);
}

/** Same value and same unit; 600 Ω and 600 H are not equal. */
export function equalQuantity(a: Quantity, b: Quantity): boolean {
  return a.significand === b.significand && a.exponent === b.exponent && a.unit === b.unit;
}

/**
 * Exact order: negative when `a` is the smaller, 0 when equal, positive otherwise.
 *
 * @throws QuantityError `unit-mismatch`
 */
export function compareQuantity(a: Quantity, b: Quantity): number {
  const [left, right] = aligned(a, b);
  return left < right ? -1 : left > right ? 1 : 0;
}

/**
 * `a / b` as a float: 1 for equal values, 2 for twice as much.
 *
 * @throws QuantityError `unit-mismatch`, `division-by-zero`
 */
export function ratioOf(a: Quantity, b: Quantity): number {
  requireSameUnit(a, b);
  if (b.significand === 0) throw new QuantityError('division-by-zero', 'A ratio to zero has no value');
  return Number(`${a.significand}e${a.exponent - b.exponent}`) / b.significand;
}

function aligned(a: Quantity, b: Quantity): [bigint, bigint, number] {
  requireSameUnit(a, b);
  const exponent = Math.min(a.exponent, b.exponent);
  return [
    BigInt(a.significand) * 10n ** BigInt(a.exponent - exponent),
    BigInt(b.significand) * 10n ** BigInt(b.exponent - exponent),
    exponent,
  ];
}

function requireSameUnit(a: Quantity, b: Quantity): void {
  if (a.unit !== b.unit) throw new QuantityError('unit-mismatch', `${a.unit} and ${b.unit} cannot be compared`);
}

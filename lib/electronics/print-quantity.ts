/**
 * Writes a quantity for people: `4.7 kΩ` with engineering prefixes, or `4k7` in the letter-for-point form of IEC 60062.
 * Both are exact, and readQuantity gives the same quantity back from either without a doubt.
 */
import type { Quantity, Unit } from './part-spec';

/**
 * Millifarads are left out on purpose: on old drawings `mF` stands for microfarad, so the trade writes 4700 µF. Nothing
 * below the first prefix or above the last has a name; it gets the nearest.
 */
const PREFIXES: Readonly<Record<Unit, readonly (readonly [exponent: number, prefix: string])[]>> = {
  ohm: [
    [-3, 'm'],
    [0, ''],
    [3, 'k'],
    [6, 'M'],
    [9, 'G'],
    [12, 'T'],
  ],
  farad: [
    [-12, 'p'],
    [-9, 'n'],
    [-6, 'µ'],
    [0, ''],
  ],
  henry: [
    [-9, 'n'],
    [-6, 'µ'],
    [-3, 'm'],
    [0, ''],
  ],
  hertz: [
    [-3, 'm'],
    [0, ''],
    [3, 'k'],
    [6, 'M'],
    [9, 'G'],
  ],
  volt: [
    [-6, 'µ'],
    [-3, 'm'],
    [0, ''],
    [3, 'k'],
  ],
  ampere: [
    [-9, 'n'],
    [-6, 'µ'],
    [-3, 'm'],
    [0, ''],
  ],
  watt: [
    [-6, 'µ'],
    [-3, 'm'],
    [0, ''],
    [3, 'k'],
  ],
};

export const UNIT_SIGNS: Readonly<Record<Unit, string>> = {
  ohm: 'Ω',
  farad: 'F',
  henry: 'H',
  hertz: 'Hz',
  volt: 'V',
  ampere: 'A',
  watt: 'W',
};

/** From here upwards capacitance is written in farads (`0.47 F`), as on double-layer capacitors. */
const SMALLEST_IN_FARADS = -1;

/** `4.7 kΩ`, `100 nF`, `0 Ω`, `0.5 mΩ`, `4700 µF`; every digit is shown. */
export function printQuantity(value: Quantity): string {
  const [exponent, prefix] = prefixFor(value);
  return `${decimalAt(value, exponent)} ${prefix}${UNIT_SIGNS[value.unit]}`;
}

/** Power of ten of the first digit: 3 for 4700, -1 for 0.47. */
function magnitude(value: Quantity): number {
  return value.significand === 0 ? 0 : value.exponent + String(Math.abs(value.significand)).length - 1;
}

function prefixFor(value: Quantity): readonly [number, string] {
  const plain = [0, ''] as const;
  if (value.significand === 0) return plain;
  const size = magnitude(value);
  if (value.unit === 'farad' && size >= SMALLEST_IN_FARADS) return plain;
  // 0.47 Ω is what the trade says; milliohms begin below a tenth.
  if (value.unit === 'ohm' && size === -1) return plain;
  const named = PREFIXES[value.unit].filter(([exponent]) => !(value.unit === 'farad' && exponent === 0));
  return named.filter(([exponent]) => exponent <= size).at(-1) ?? named[0] ?? plain;
}

/** The value divided by 10^exponent, as a plain decimal without trailing zeros. */
function decimalAt(value: Quantity, exponent: number): string {
  const sign = value.significand < 0 ? '-' : '';
  const digits = String(Math.abs(value.significand));
  const power = value.exponent - exponent;
  if (power >= 0) return sign + digits + '0'.repeat(value.significand === 0 ? 0 : power);
  const padded = digits.padStart(1 - power, '0');
  return `${sign}${padded.slice(0, power)}.${padded.slice(power)}`;
}

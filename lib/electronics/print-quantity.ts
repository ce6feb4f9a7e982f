/** A quantity for people: with an engineering prefix (`4.7 kΩ`) or in the form of IEC 60062 (`4k7`). Reading either gives it back. */
import type { Quantity, Unit } from './part-spec';

const SYMBOLS: Readonly<Record<Unit, string>> = { ohm: 'Ω', farad: 'F', henry: 'H', hertz: 'Hz', volt: 'V', ampere: 'A', watt: 'W' };
const PREFIXES: Readonly<Record<number, string>> = { [-15]: 'f', [-12]: 'p', [-9]: 'n', [-6]: 'µ', [-3]: 'm', 0: '', 3: 'k', 6: 'M', 9: 'G', 12: 'T' };

function engineering({ significand, exponent }: Quantity, highest = 12, lowest = -15): { mantissa: string; power: number } {
  if (significand === 0) return { mantissa: '0', power: 0 };
  const digits = String(Math.abs(significand));
  const magnitude = digits.length - 1 + exponent;
  const power = Math.max(lowest, Math.min(highest, Math.floor(magnitude / 3) * 3));
  const point = digits.length + exponent - power;
  const mantissa = point <= 0 ? `0.${'0'.repeat(-point)}${digits}` : point >= digits.length ? digits + '0'.repeat(point - digits.length) : `${digits.slice(0, point)}.${digits.slice(point)}`;
  return { mantissa: significand < 0 ? `-${mantissa}` : mantissa, power };
}

/** `4.7 kΩ`, `100 nF`, `16 MHz`. Farads stay at or below the micro, as the trade writes them (`2200 µF`). */
export function printQuantity(given: Quantity): string {
  const { mantissa, power } = engineering(given, given.unit === 'farad' ? -6 : 12, given.unit === 'farad' ? -12 : -15);
  const prefix = given.significand === 0 ? '' : (PREFIXES[power] ?? '');
  return `${mantissa} ${prefix}${SYMBOLS[given.unit]}`;
}

/** IEC 60062: the prefix in the place of the decimal point, `R` for ohms: `4k7`, `470R`, `R47`, `100n`, `4µ7` as `4u7`. */
export function printCode(given: Quantity): string {
  const { mantissa, power } = engineering(given, given.unit === 'farad' ? -6 : 9, given.unit === 'ohm' ? 0 : -15);
  const letter = power === 0 ? (given.unit === 'ohm' ? 'R' : given.unit === 'farad' ? 'F' : '') : power === -6 ? 'u' : (PREFIXES[power] ?? '');
  const [whole = '0', fraction = ''] = mantissa.split('.');
  return `${whole === '0' && fraction !== '' ? '' : whole}${letter}${fraction}`;
}

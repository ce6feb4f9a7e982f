/** Preferred numbers of IEC 60063: E3 to E192, nearest by ratio, neighbours, and the series a value belongs to. */
import type { Quantity } from './part-spec';
import { quantity, ratioOf } from './quantity';

export const SERIES = ['E3', 'E6', 'E12', 'E24', 'E48', 'E96', 'E192'] as const;
export type Series = (typeof SERIES)[number];

/** E24 and below do not follow the rule below, so they are tabulated; E12, E6, E3 are every 2nd, 4th, 8th of E24. */
const E24 = [
  100, 110, 120, 130, 150, 160, 180, 200, 220, 240, 270, 300, 330, 360, 390, 430, 470, 510, 560, 620, 680, 750, 820,
  910,
] as const;
/** E192 number 185 computes to 919 but the standard says 920 (IEC 60063). */
const E192_EXCEPTION = { index: 185, value: 920 } as const;

function byRule(count: number): number[] {
  return Array.from({ length: count }, (_, index) => {
    if (count === 192 && index === E192_EXCEPTION.index) return E192_EXCEPTION.value;
    return Math.round(100 * 10 ** (index / count));
  });
}

const NUMBERS: Readonly<Record<Series, readonly number[]>> = {
  E3: E24.filter((_, index) => index % 8 === 0),
  E6: E24.filter((_, index) => index % 4 === 0),
  E12: E24.filter((_, index) => index % 2 === 0),
  E24,
  E48: byRule(48),
  E96: byRule(96),
  E192: byRule(192),
};

/** ±percent that a series is usually sold in; a guess only, a printed tolerance wins (IEC 60063). */
const USUAL_TOLERANCE: Readonly<Record<Series, number>> = {
  E3: 40,
  E6: 20,
  E12: 10,
  E24: 5,
  E48: 2,
  E96: 1,
  E192: 0.5,
};
export const usualTolerancePercent = (series: Series): number => USUAL_TOLERANCE[series];

/** The numbers of one decade, 100 to 999. */
export const numbersOf = (series: Series): readonly number[] => NUMBERS[series];

function positive(value: number): void {
  if (!(value > 0 && Number.isFinite(value))) throw new RangeError(`${value} is not a positive value`);
}

/** Power of ten that brings the value into 100 … 999; found by text, since logarithms of exact decades round. */
function decadeOf(value: number): number {
  return Number(value.toExponential().split('e')[1]) - 2;
}

const at = (number: number, decade: number): number => Number(`${number}e${decade}`);

/** Preferred values just below and above (or the value itself twice where it is one). Throws RangeError unless > 0. */
function neighbours(value: number, series: Series): readonly [number, number] {
  positive(value);
  const decade = decadeOf(value);
  const around = [decade - 1, decade, decade + 1].flatMap((power) =>
    NUMBERS[series].map((number) => at(number, power)),
  );
  const exact = around.find((candidate) => Math.abs(candidate / value - 1) < 1e-9);
  if (exact !== undefined) return [exact, exact];
  const below = Math.max(...around.filter((candidate) => candidate < value));
  const above = Math.min(...around.filter((candidate) => candidate > value));
  return [below, above];
}

/** The preferred value nearest by ratio (|ln|), never linearly: 300 k in E12 is 330 k. Throws RangeError unless > 0. */
export function nearestPreferred(value: number, series: Series): number {
  const [below, above] = neighbours(value, series);
  return value / below <= above / value ? below : above;
}

/** Exactly: 4.7 kΩ is in E24, 4.71 kΩ is not. Zero and negative values are in none. */
export function isPreferred(value: Quantity, series: Series): boolean {
  const digits = String(value.significand);
  return digits.length <= 3 && NUMBERS[series].includes(Number(digits.padEnd(3, '0')));
}

/** The preferred quantity nearest by ratio, exactly. Throws RangeError unless > 0. */
export function roundToSeries(value: Quantity, series: Series): Quantity {
  const [below, above] = stepsAround(value, series);
  return ratioOf(value, below) <= ratioOf(above, value) ? below : above;
}

/** Exact preferred quantities at or next below and at or next above. Throws RangeError unless > 0. */
export function stepsAround(value: Quantity, series: Series): readonly [Quantity, Quantity] {
  positive(value.significand);
  if (isPreferred(value, series)) return [value, value];
  const numbers = NUMBERS[series];
  const digits = String(value.significand);
  const exponent = value.exponent + digits.length - 3;
  const mantissa = Number(`${digits}e${3 - digits.length}`);
  const aboveIndex = numbers.findIndex((number) => number > mantissa);
  const above =
    aboveIndex === -1
      ? quantity(1000, exponent, value.unit)
      : quantity(numbers[aboveIndex] ?? 1000, exponent, value.unit);
  const below = numbers[(aboveIndex === -1 ? numbers.length : aboveIndex) - 1] ?? 100;
  return [quantity(below, exponent, value.unit), above];
}

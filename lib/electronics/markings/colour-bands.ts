/** Colour bands of resistors (IEC 60062): two or three digits, multiplier, tolerance. */

const DIGITS = ['black', 'brown', 'red', 'orange', 'yellow', 'green', 'blue', 'violet', 'grey', 'white'] as const;

const MULTIPLIERS: Readonly<Record<number, BandName>> = {
  [-3]: 'pink',
  [-2]: 'silver',
  [-1]: 'gold',
  0: 'black',
  1: 'brown',
  2: 'red',
  3: 'orange',
  4: 'yellow',
  5: 'green',
  6: 'blue',
  7: 'violet',
  8: 'grey',
  9: 'white',
};

const TOLERANCES: Readonly<Record<string, BandName>> = {
  '0.05': 'orange',
  '0.1': 'violet',
  '0.25': 'blue',
  '0.5': 'green',
  '1': 'brown',
  '2': 'red',
  '5': 'gold',
  '10': 'silver',
};

export type BandName = (typeof DIGITS)[number] | 'gold' | 'silver' | 'pink';

/** Parts of 2 % and better bear three digits, coarser ones two (IEC 60062). */
const THREE_DIGITS_UP_TO_PERCENT = 2;

/**
 * @param ohms a resistance above zero; 0 is the single black band of a link
 * @param tolerancePercent ±percent as sold
 * @returns the bands from the left, or null where the value has too many digits or no band stands for it
 */
export function resistorBands(ohms: number, tolerancePercent: number): readonly BandName[] | null {
  if (ohms === 0) return ['black'];
  const tolerance = TOLERANCES[String(tolerancePercent)];
  if (!(ohms > 0) || !Number.isFinite(ohms) || tolerance === undefined) return null;
  const count = tolerancePercent <= THREE_DIGITS_UP_TO_PERCENT ? 3 : 2;
  const [digits = '', power = '0'] = ohms.toExponential(count - 1).split('e');
  const significand = digits.replace('.', '');
  const exponent = Number(power) - (count - 1);
  if (Math.abs(Number(`${significand}e${exponent}`) / ohms - 1) > 1e-9) return null;
  const multiplier = MULTIPLIERS[exponent];
  if (multiplier === undefined) return null;
  return [...[...significand].map((digit) => DIGITS[Number(digit)] ?? 'black'), multiplier, tolerance];
}

/** Ohms that bands stand for, without the tolerance band; null where one of them is no digit or multiplier. */
export function ohmsOfBands(bands: readonly BandName[]): number | null {
  if (bands.length === 1 && bands[0] === 'black') return 0;
  const digits = bands.slice(0, -2).map((band) => DIGITS.findIndex((colour) => colour === band));
  const multiplier = bands.at(-2);
  const exponent = Object.keys(MULTIPLIERS).find((power) => MULTIPLIERS[Number(power)] === multiplier);
  if (digits.length < 2 || digits.some((digit) => digit < 0) || exponent === undefined) return null;
  return Number(`${digits.join('')}e${exponent}`);
}

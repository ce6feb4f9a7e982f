/**
 * Tolerance letters of IEC 60062, as they follow a value (`4K7J`) or a code (`104K`). Letters on which published lists
 * disagree (A, E, L, P, W, Y) are left out of reading; they mean nothing certain without the maker's sheet.
 */

export interface ToleranceRange {
  readonly lowPercent: number;
  readonly highPercent: number;
}

const SYMMETRIC: Readonly<Record<string, number>> = {
  B: 0.1,
  C: 0.25,
  D: 0.5,
  F: 1,
  G: 2,
  H: 3,
  J: 5,
  K: 10,
  M: 20,
  N: 30,
};

/** One-sided ranges met on electrolytic and class 2 ceramic capacitors. */
const LOPSIDED: Readonly<Record<string, ToleranceRange>> = {
  Q: { lowPercent: -10, highPercent: 30 },
  S: { lowPercent: -20, highPercent: 50 },
  T: { lowPercent: -10, highPercent: 50 },
  V: { lowPercent: -10, highPercent: 100 },
  Z: { lowPercent: -20, highPercent: 80 },
};

/** Below 10 pF these letters are absolute, in picofarads (IEC 60062). */
const ABSOLUTE_PICOFARADS: Readonly<Record<string, number>> = { B: 0.1, C: 0.25, D: 0.5, F: 1, G: 2 };

/** @returns the range that a capital letter stands for, or null where it is none or sources disagree */
export function toleranceRange(letter: string): ToleranceRange | null {
  const symmetric = SYMMETRIC[letter];
  return symmetric === undefined ? (LOPSIDED[letter] ?? null) : { lowPercent: -symmetric, highPercent: symmetric };
}

/**
 * ±percent for a letter beside a value.
 *
 * @param picofarads the value where it is a capacitance, since below 10 pF some letters are absolute; null otherwise
 * @returns null for lopsided ranges and unknown letters
 */
export function tolerancePercentOf(letter: string, picofarads: number | null): number | null {
  const absolute = ABSOLUTE_PICOFARADS[letter];
  if (picofarads !== null && picofarads > 0 && picofarads < 10 && absolute !== undefined) {
    return Number(((absolute / picofarads) * 100).toPrecision(3));
  }
  return SYMMETRIC[letter] ?? null;
}

/** The letter for ±percent, or null where none is in use. */
export function toleranceLetter(tolerancePercent: number): string | null {
  return Object.keys(SYMMETRIC).find((letter) => SYMMETRIC[letter] === tolerancePercent) ?? null;
}

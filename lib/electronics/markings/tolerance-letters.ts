/**
 * Tolerance letters of IEC 60062, as they follow a value (`4K7J`) or a code (`104K`). Letters on which published lists
 * disagree (A, E, L, P, W, Y) are left out of reading; they mean nothing certain without the maker's sheet.
 */

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

/** Below 10 pF these letters are absolute, in picofarads (IEC 60062). */
const ABSOLUTE_PICOFARADS: Readonly<Record<string, number>> = { B: 0.1, C: 0.25, D: 0.5, F: 1, G: 2 };

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

/** Finds the value among the words of a text: `ferrite bead 600R@100MHz 0805`, `2x 10k matched`, `47 k`. */
import type { PartKind } from './part-spec';
import { type ReadQuantity, readQuantity, unitOfKind } from './read-quantity';

const MOST_WORDS = 14;
const UNIT_ALONE =
  /^(?:[fpnumkKMG]|meg|[kMm]?ohms?|[fpnumkKMG]?(?:Ω|F|f|H|h|Hz|hz|HZ|R)|[pnumPNUM]F|[MmKk]H[zZ]|mfd)$/i;
const DIGITS = /^[\d.,]+$/;
/** Sizes, temperatures, counts and a count before a value (`2x 10k`), which are no values. */
const NOT_VALUES =
  /(^|[\s,;(])(?:\d+(?:[.,]\d+)?\s?(?:mm|cm|ppm(?:\/\S*)?|°C|degC|pins?|pcs?|way|turns?|gang)(?=$|[\s,;)])|\d+(?:[.,]\d+)?x\d+(?:[.,]\d+)?(?:x\d+(?:[.,]\d+)?)?|\d{1,2}\s?x(?=\s))/gi;

/**
 * @param text without ratings, taper letter and package
 * @param kind null where only the text can tell
 * @returns the first reading, or null where no word reads as a value
 */
export function findValue(text: string, kind: PartKind | null): ReadQuantity | null {
  if (kind !== null && unitOfKind(kind) === null) return null;
  const whole = readQuantity(text, kind);
  if (whole !== null && (kind !== null || !DIGITS.test(text))) return whole;
  const words = text
    .replace(NOT_VALUES, '$1 ')
    .split(/[\s;|()[\]]+|,(?!\d)|\*|@\S*|(?<=[A-Za-zΩ])\/(?=\d)/)
    .map((word) => word.replace(/^[=:~≈±"']+|[.:*,?"'!/]+$/g, ''))
    .filter((word) => word !== '')
    .slice(0, MOST_WORDS);
  let designatorLike: ReadQuantity | null = null;
  for (const [index, word] of words.entries()) {
    const next = words[index + 1];
    const pair =
      next !== undefined && /\d$/.test(word) && DIGITS.test(word) && UNIT_ALONE.test(next)
        ? readQuantity(`${word} ${next}`, kind)
        : null;
    const read = pair ?? readQuantity(word, kind);
    if (read === null) continue;
    // A bare number counts only where it stands first: later ones are counts, sizes and years.
    if (pair === null && DIGITS.test(word) && (kind === null || index > 0)) continue;
    if (pair === null && /^[RCL]\d{1,3}$/.test(word) && words.length > 1) {
      designatorLike ??= read;
      continue;
    }
    return read;
  }
  return designatorLike;
}

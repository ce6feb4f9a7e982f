/** Finds the word that is a maker's number, and the family it belongs to where one is known. */
import { familyOf, type FamilyName } from './families/family-of';
import { PACKAGE_PATTERNS } from './part-words';
import type { PartKind } from './part-spec';
import { readQuantity } from './read-quantity';

export interface FoundNumber {
  /** As written. */
  readonly partNumber: string;
  readonly family: FamilyName | null;
}

/** Kinds that are named by a number rather than by a value. */
export const NUMBERED: readonly PartKind[] = ['diode', 'transistor', 'ic', 'regulator', 'optocoupler', 'led'];

const SHAPE = /^(?=\S*\d)(?=\S*[A-Za-z])[A-Za-z0-9][A-Za-z0-9./+,#-]{1,40}$/;
const NO_NUMBER: readonly RegExp[] = [
  /^\d+(?:[.,]\d+)?-?(?:mm|cm|V|VDC|W|A|mA|mcd|nm|pins?|pol|way|leaded|leads?|pos|p|pcs|turn|K|deg|°C|C)$/i,
  /^\d+(?:[.,]\d+)?[xX]\d+/,
  /^M\d(?:[.,]\d)?(?:x\d+.*)?$/i,
  /^(?:\d{1,2}[VvRr]\d{1,2}|[ABCDW]?\d+(?:[.,]\d+)?[kKM][ABCD]?)$/,
  /^[A-Za-z]{5,}\d$/,
  /^(?:RV|VR|R|C|L|D|Q|U|IC|J|SW)\d{1,2}$/,
];

/**
 * @param text with its ratings, since `LM4040-10V` carries its volts in the number
 * @param kind what the line is for, where known; values never have a number on resistors and the like
 */
export function findPartNumber(text: string, kind: PartKind | null): FoundNumber | null {
  const words = text
    .split(/[\s;|()[\]"]+/)
    .map((word) => word.replace(/^[,:]+|[,:.*?]+$/g, ''))
    .filter((word) => word !== '');
  const named = familyAmong(text, words, kind);
  if (named !== null) return named;
  if (kind === 'resistor' || kind === 'pcb') return null;
  for (const word of words) {
    if (/^\d{2,6}$/.test(word)) {
      if (kind !== null && NUMBERED.includes(kind) && kind !== 'led' && words.length === 1)
        return { partNumber: word, family: null };
      continue;
    }
    if (!SHAPE.test(word) || NO_NUMBER.some((pattern) => pattern.test(word))) continue;
    if (PACKAGE_PATTERNS.some(([pattern]) => pattern.exec(word)?.[0].trim() === word)) continue;
    if (word.length >= 4 || (kind !== null && NUMBERED.includes(kind))) return { partNumber: word, family: null };
  }
  return null;
}

function familyAmong(text: string, words: readonly string[], kind: PartKind | null): FoundNumber | null {
  for (const [index, word] of words.slice(0, 8).entries()) {
    // A bare number inside words is a quantity or a size; alone it may be a type, such as 4093.
    if (
      !/\d/.test(word) ||
      (!/[A-Za-z]/.test(word) && words.length > 1 && (kind === null || !NUMBERED.includes(kind) || index > 0))
    )
      continue;
    if (/[A-Za-z]/.test(word) && readQuantity(word, null) !== null) continue;
    const family = familyOf(word);
    if (family !== null) return { partNumber: word, family };
    // `TL 072` and `BC 547 B` in two words.
    const joined = /^[A-Za-z]{1,4}$/.test(words[index - 1] ?? '') ? `${words[index - 1] ?? ''}${word}` : null;
    const spaced = joined === null ? null : familyOf(joined);
    if (joined !== null && spaced !== null) return { partNumber: `${words[index - 1] ?? ''} ${word}`, family: spaced };
  }
  const whole = words.length <= 3 && /[A-Za-z]/.test(text) && readQuantity(text, null) === null ? familyOf(text) : null;
  return whole === null ? null : { partNumber: words.slice(0, 2).join(' '), family: whole };
}

/**
 * The taper of a potentiometer: words win; a bare letter A or B depends on the convention (current makers A log,
 * B linear; old European A linear, B log), so without one it is a doubt. C is reverse log in both.
 */
import type { Doubt, PartKind, Taper } from './part-spec';

export type TaperConvention = 'ask' | 'letters' | 'old-european';

const WORDS: readonly (readonly [RegExp, Taper])[] = [
  [/\b(?:anti[- ]?log\w*|(?:rev(?:erse)?|neg(?:ative?)?|inv(?:erse)?)\.?[- ]?(?:log\w*|audio))\b/i, 'reverse-log'],
  [/\b(?:pos\.?[- ]?)?(?:log(?:arithmi\w*|aritmi\w*)?|audio)\b/i, 'log'],
  [/\blin(?:ear\w*|eair|eaire|eal|eare)?\b/i, 'linear'],
];
const BEFORE = /(^|[\s(])([ABCDW])\s?(\d+(?:[.,]\d+)?\s?(?:[kKMR]\d*|\d{2}))(?=$|[\s,;/()[\]|*-])/;
const AFTER = /(^|[\s(])(\d+(?:[.,]\d+)?\s?(?:[kK]|M)\d*)\s?(?:Ω|ohms?)?([- ]?)([ABCDWabcd])(?=$|[\s,;/()[\]|*-])/;

/** A value in ohms beside `lin` or `log`; `audio codec` alone is no potentiometer. */
const OHMS = /(?:^|[\s(])\d+(?:[.,]\d+)?\s?(?:[kKM]\d*|R|Ω)(?=$|[\s,;/()|-])/;

export interface ReadTaper {
  readonly taper: Taper | null;
  readonly doubt: Doubt | null;
  /** The text with the letter taken off the value. */
  readonly rest: string;
}

/**
 * @param text after tidyValueText
 * @param kind a letter beside a value says potentiometer only where nothing else does; words need a value beside them
 */
export function readTaper(text: string, convention: TaperConvention, kind: PartKind | null): ReadTaper {
  const none: ReadTaper = { taper: null, doubt: null, rest: text };
  if (kind !== null && kind !== 'potentiometer' && kind !== 'trimmer') return none;
  const before = BEFORE.exec(text);
  const after = before ? null : AFTER.exec(text);
  // `10k C` may be a temperature or a column of its own; only a letter that touches the value makes a potentiometer.
  const touches = before !== null || after?.[3] === '' || kind !== null;
  const letter = touches ? ((before?.[2] ?? after?.[4])?.toUpperCase() ?? null) : null;
  const found = letter === null ? null : (before ?? after);
  const value = before?.[3] ?? after?.[2] ?? '';
  const rest =
    found === null
      ? text
      : `${text.slice(0, found.index)} ${value} ${text.slice(found.index + found[0].length)}`
          .replace(/\s+/g, ' ')
          .trim();
  const word = WORDS.find(([pattern]) => pattern.test(text))?.[1] ?? null;
  if (word !== null && (kind !== null || found !== null || OHMS.test(text))) return { taper: word, doubt: null, rest };
  if (letter === null) return none;
  if (letter === 'C') return { taper: 'reverse-log', doubt: null, rest };
  if (letter !== 'A' && letter !== 'B') return { taper: 'other', doubt: null, rest };
  const usual: Taper = letter === 'A' ? 'log' : 'linear';
  const old: Taper = letter === 'A' ? 'linear' : 'log';
  if (convention === 'letters') return { taper: usual, doubt: null, rest };
  if (convention === 'old-european') return { taper: old, doubt: null, rest };
  return { taper: letter === 'A' ? 'letter-A' : 'letter-B', doubt: conventionDoubt(letter, usual, old), rest };
}

function conventionDoubt(letter: string, usual: Taper, old: Taper): Doubt {
  const said = (taper: Taper) => (taper === 'log' ? 'logarithmic' : 'linear');
  return {
    code: 'taper-convention',
    ask: `Taper ${letter}: ${said(usual)} as most makers mark it, ${said(old)} on old European parts. Which is meant?`,
    options: [said(usual), said(old)],
  };
}

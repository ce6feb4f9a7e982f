/**
 * The taper of a potentiometer: words win; a bare letter A or B depends on the convention (current makers A log,
 * B linear; old European A linear, B log), so without one it is a doubt. C is reverse log in both.
 */
import type { Doubt, Taper } from './part-spec';

export type TaperConvention = 'ask' | 'letters' | 'old-european';

const WORDS: readonly (readonly [RegExp, Taper])[] = [
  [/\b(?:anti[- ]?log\w*|rev(?:erse)?[- ]?(?:log\w*|audio)|inverse log\w*)\b/i, 'reverse-log'],
  [/\b(?:log(?:arithmic|arithmisch|aritmico|arítmico)?|audio)\b/i, 'log'],
  [/\b(?:lin(?:ear|eair|éaire|eal|eare)?)\b/i, 'linear'],
];
const BEFORE = /(^|[\s(])([ABCD])\s*(\d+(?:[.,]\d+)?\s*[kKMR]?\d*)(?=$|[\s,;/()[\]|*-])/;
const AFTER = /(^|[\s(])(\d+(?:[.,]\d+)?\s*[kKM])\s*(?:Ω|ohms?)?[- ]?([ABCD])(?=$|[\s,;/()[\]|*-])/i;

export interface ReadTaper {
  readonly taper: Taper | null;
  readonly doubt: Doubt | null;
  /** The text with the letter taken off the value. */
  readonly rest: string;
}

export function readTaper(text: string, convention: TaperConvention): ReadTaper {
  const before = BEFORE.exec(text);
  const after = before ? null : AFTER.exec(text);
  const letter = (before?.[2] ?? after?.[3])?.toUpperCase() ?? null;
  const found = before ?? after;
  const value = before?.[3] ?? after?.[2];
  const rest = found
    ? `${text.slice(0, found.index)} ${value ?? ''} ${text.slice(found.index + found[0].length)}`
        .replace(/\s+/g, ' ')
        .trim()
    : text;
  const word = WORDS.find(([pattern]) => pattern.test(text))?.[1] ?? null;
  if (word !== null) return { taper: word, doubt: null, rest };
  if (letter === null) return { taper: null, doubt: null, rest };
  if (letter === 'C') return { taper: 'reverse-log', doubt: null, rest };
  if (letter === 'D') return { taper: 'other', doubt: null, rest };
  if (convention === 'letters') return { taper: letter === 'A' ? 'log' : 'linear', doubt: null, rest };
  if (convention === 'old-european') return { taper: letter === 'A' ? 'linear' : 'log', doubt: null, rest };
  const usual = letter === 'A' ? 'logarithmic' : 'linear';
  const old = letter === 'A' ? 'linear' : 'logarithmic';
  return {
    taper: letter === 'A' ? 'letter-A' : 'letter-B',
    doubt: {
      code: 'taper-convention',
      ask: `Taper ${letter}: ${usual} under IEC and Asian marking, ${old} on old European parts. Which is meant?`,
      options: [usual, old],
    },
    rest,
  };
}

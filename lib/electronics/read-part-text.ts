/**
 * One text about one part to what it says: `100n X7R 50V`, `TL072 or NJM4580`, `B50k lin`, `10u/25v`, `DNP`. The kind may
 * be given (a designator or a heading told it); otherwise the text must tell. What is not said stays null.
 */
import { familyOf } from './families/family-of';
import type { Doubt, PartKind, PartSpec, Quantity } from './part-spec';
import {
  DIELECTRIC_WORDS,
  firstOf,
  KIND_WORDS,
  MOUNTING_WORDS,
  NOT_FITTED,
  PACKAGE_PATTERNS,
  TECHNOLOGY_WORDS,
} from './part-words';
import { printQuantity } from './print-quantity';
import { compareQuantity } from './quantity';
import { type ReadQuantity, readQuantity, unitOfKind } from './read-quantity';
import { readRatings } from './read-ratings';
import { readTaper, type TaperConvention } from './read-taper';
import { tidyValueText } from './tidy-value-text';

export interface ReadOptions {
  readonly kind?: PartKind | null;
  /** How a bare taper letter is read; `ask` (the default) gives a doubt. */
  readonly taperConvention?: TaperConvention;
}

const LONGEST_TEXT = 500;
const OHMIC: readonly PartKind[] = ['resistor', 'potentiometer', 'trimmer', 'thermistor'];
const VALUED: readonly PartKind[] = [...OHMIC, 'capacitor', 'inductor', 'crystal'];
/** These are named by a number; a bare number on one is no value. */
const NUMBERED: readonly PartKind[] = ['diode', 'transistor', 'ic', 'regulator', 'optocoupler', 'led'];

/** Never throws; a text of which nothing is understood has null in every field but `text`. */
export function readPartText(text: string, options: ReadOptions = {}): PartSpec {
  const tidy = tidyValueText(text.slice(0, LONGEST_TEXT)).replace(/\s+/g, ' ');
  const fitted = !NOT_FITTED.test(tidy) && !/^(?:n\/a|nc|dnp|-+)$/i.test(tidy);
  const { main, others } = splitAlternatives(tidy.replace(NOT_FITTED, ' ').replace(/[()[\]]\s*[)\]]/g, ' '));
  const given = options.kind ?? null;
  const family = VALUED.includes(given ?? 'other') ? null : familyIn(main);
  const kind = given ?? family?.kind ?? kindOf(main);
  const ratings = readRatings(main);
  const isPot = kind === 'potentiometer' || kind === 'trimmer';
  const taper =
    isPot || kind === null
      ? readTaper(ratings.rest, options.taperConvention ?? 'ask')
      : { taper: null, doubt: null, rest: ratings.rest };
  const dielectric = kind === 'capacitor' || kind === null ? firstOf(DIELECTRIC_WORDS, main) : null;
  const packaging = packageIn(main);
  const read =
    family === null && !NUMBERED.includes(kind ?? 'other') ? valueIn(taper.rest, kind, dielectric !== null) : null;
  const finalKind = kind ?? read?.kind ?? (dielectric !== null ? 'capacitor' : null);
  const keepsTaper = finalKind === 'potentiometer' || finalKind === 'trimmer';
  const doubts: Doubt[] = [...(read?.read.doubts ?? [])];
  if (taper.doubt && keepsTaper && fitted) doubts.push(taper.doubt);
  const range = rangeIn(tidy, finalKind);
  if (range)
    doubts.push({
      code: 'either-of',
      ask: `“${text.trim()}” leaves the value open. Which one goes in?`,
      options: [printQuantity(range.low), printQuantity(range.high)],
    });
  const partNumber = read ? null : partNumberIn(ratings.rest, finalKind, family !== null);
  return {
    kind: finalKind,
    value: range?.low ?? read?.read.quantity ?? null,
    tolerancePercent: ratings.tolerancePercent ?? read?.read.tolerancePercent ?? null,
    ratedVolts: ratings.ratedVolts,
    ratedWatts: ratings.ratedWatts,
    ratedAmperes: ratings.ratedAmperes,
    dielectric: finalKind === 'capacitor' ? (dielectric ?? firstOf(DIELECTRIC_WORDS, tidy)) : null,
    technology: finalKind === 'resistor' ? firstOf(TECHNOLOGY_WORDS, main) : null,
    taper: keepsTaper ? taper.taper : null,
    mounting: packaging?.mounting ?? firstOf(MOUNTING_WORDS, main),
    package: packaging?.name ?? null,
    partNumber,
    family: family?.familyId ?? null,
    alternatives: others,
    fitted,
    doubts: fitted ? doubts : [],
    text,
  };
}

const ALTERNATIVE_WORDS =
  /\s*(?:\bor\b|\boder\b|\bou\b|\bof\b(?=\s*[A-Z0-9])|\bequiv(?:alent)?\.?:?|\balso\b:?|\bsubs?(?:titute)?\b:?|\balt(?:ernative(?:ly)?)?\b\.?:?|\bersatz\b:?|\|)\s*/i;

/** What is asked for first, and what may stand for it: `TL072 or NJM4580`, `1N5817/1N5819`, `BAT41 (substitute: 1N5817)`. */
function splitAlternatives(text: string): { main: string; others: string[] } {
  const clean = (piece: string) => piece.replace(/^[\s,;:=(\[]+|[\s,;:=)\]]+$/g, '').trim();
  const pieces = text
    .split(ALTERNATIVE_WORDS)
    .map(clean)
    .filter((piece) => piece !== '');
  const [first = '', ...rest] = pieces;
  const slashed = splitSlash(first);
  return {
    main: slashed[0] ?? '',
    others: [...slashed.slice(1), ...rest].filter((piece) => /[A-Za-z0-9]/.test(piece)).slice(0, 10),
  };
}

/** A slash parts two numbers of parts or two values, but not a value from its rating (`10u/25V`) or a fraction (`1/4W`). */
function splitSlash(text: string): string[] {
  const pieces = text.split(/\s*\/\s*/);
  if (pieces.length < 2 || pieces.length > 5) return [text];
  const looksWhole = (piece: string) => familyOf(piece) !== null || /^[A-Z]{1,5}\d{2,5}[A-Z]{0,4}$/i.test(piece);
  return pieces.every((piece) => looksWhole(piece)) &&
    pieces.every((piece) => readQuantity(piece, 'resistor') === null || familyOf(piece) !== null)
    ? pieces
    : [text];
}

function familyIn(text: string): { familyId: string; kind: PartKind } | null {
  const whole = familyOf(text);
  if (whole) return whole;
  for (const token of text.split(/[\s,;()[\]|]+/).slice(0, 8)) {
    // A bare number inside words is a quantity or a size, not a type.
    if (/[A-Za-z]/.test(token) && /\d/.test(token) && readQuantity(token, null) === null) {
      const found = familyOf(token);
      if (found) return found;
    }
  }
  return null;
}

function kindOf(text: string): PartKind | null {
  return firstOf(KIND_WORDS, text);
}

function packageIn(text: string): { name: string; mounting: 'through-hole' | 'surface' | 'panel' | null } | null {
  for (const [pattern, name, mounting] of PACKAGE_PATTERNS) {
    const match = pattern.exec(text);
    if (match) return { name: name(match), mounting };
  }
  return null;
}

/** The first token, or pair of tokens (`4.7 kΩ`), that reads as a value of the kind. */
function valueIn(
  text: string,
  kind: PartKind | null,
  isCapacitor: boolean,
): { read: ReadQuantity; kind: PartKind | null } | null {
  const asked = kind ?? (isCapacitor ? 'capacitor' : null);
  if (asked !== null && unitOfKind(asked) === null) return null;
  const tokens = text
    .split(/[\s;|()[\]]+|,(?!\d)|\*|(?<=[A-Za-zΩ])\/(?=\d)/)
    .map((token) => token.replace(/^[=:~≈]+|[.:*]+$/g, ''))
    .filter((token) => token !== '');
  for (let index = 0; index < Math.min(tokens.length, 12); index += 1) {
    const token = tokens[index] ?? '';
    const next = tokens[index + 1];
    const pair =
      next !== undefined && /^[fpnumkKMG]?(?:Ω|F|H|Hz|f|R|k|K|M|u|n|p)$/i.test(next) && /^[\d.,]+$/.test(token)
        ? readQuantity(`${token} ${next}`, asked)
        : null;
    const read = pair ?? readQuantity(token, asked);
    if (!read) continue;
    // Sizes and counts in words (`5 mm`, `2 pin`, `16mm`) are no values; a bare number is one only where it stands first.
    if (asked === null && !pair && /^[\d.,]+$/.test(token)) continue;
    if (/^[\d.,]+$/.test(token) && !pair && index > 0) continue;
    return { read, kind: asked ?? kindOfUnit(read.quantity) };
  }
  return null;
}

function kindOfUnit({ unit }: Quantity): PartKind | null {
  return unit === 'ohm'
    ? 'resistor'
    : unit === 'farad'
      ? 'capacitor'
      : unit === 'henry'
        ? 'inductor'
        : unit === 'hertz'
          ? 'crystal'
          : null;
}

/** `1M to 2M2`, `100k - 220k`: either of them will do. */
function rangeIn(text: string, kind: PartKind | null): { low: Quantity; high: Quantity } | null {
  if (kind === null || !VALUED.includes(kind)) return null;
  const match = /^\s*(\S+)\s*(?:\bto\b|\bbis\b|\ba\b|[–—])\s*(\S+)/i.exec(text) ?? /^\s*(\S+)\s+-\s+(\d\S*)/.exec(text);
  if (!match) return null;
  const low = readQuantity(match[1] ?? '', kind);
  const high = readQuantity(match[2] ?? '', kind);
  if (!low || !high || low.quantity.unit !== high.quantity.unit || compareQuantity(low.quantity, high.quantity) >= 0)
    return null;
  return { low: low.quantity, high: high.quantity };
}

const NUMBER_SHAPE = /^(?=[^\s]*\d)[A-Za-z0-9][A-Za-z0-9./+,#_-]{1,40}$/;

/** The piece that looks like a maker's number: letters and digits together, or a bare number on a part that is named by one. */
function partNumberIn(text: string, kind: PartKind | null, hasFamily: boolean): string | null {
  if (kind !== null && ['resistor', 'pcb'].includes(kind)) return null;
  const tokens = text
    .split(/[\s;|()[\]]+/)
    .map((token) => token.replace(/^[,:]+|[,:.*]+$/g, ''))
    .filter((token) => token !== '');
  if (hasFamily) {
    const named = tokens.find((token) => familyOf(token) !== null);
    if (named) return named;
    return tokens.slice(0, 2).join(' ') || null;
  }
  for (const token of tokens) {
    if (!NUMBER_SHAPE.test(token)) continue;
    if (/^[\d.,/]+$/.test(token)) {
      if (kind !== null && NUMBERED.includes(kind) && kind !== 'led' && /^\d{2,6}$/.test(token)) return token;
      continue;
    }
    if (/^\d+(?:[.,]\d+)?\s*(?:mm|cm|V|W|A|mA|pins?|way|p|x\d+)$/i.test(token) || /^\d+[xX]\d+$/.test(token)) continue;
    if (PACKAGE_PATTERNS.some(([pattern]) => pattern.exec(token)?.[0]?.trim() === token)) continue;
    if (/[A-Za-z]/.test(token) && /\d/.test(token) && (token.length >= 4 || NUMBERED.includes(kind ?? 'other')))
      return token;
  }
  return null;
}

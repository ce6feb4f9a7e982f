/**
 * Parts a text into what is asked for, what may stand for it, and the span between two values: `TL072 or NJM4580`,
 * `1N5817/1N5819`, `BAT41 (substitute: 1N5817)`, `A470K [sub: A500K]`, `50k | ALPHA 9mm (or 100k)`, `1M to 2M2`.
 */
import { familyOf } from './families/family-of';
import type { PartKind, Quantity } from './part-spec';
import { compareQuantity } from './quantity';
import { readQuantity } from './read-quantity';

export interface Alternatives {
  /** What is asked for first, with its remarks. */
  readonly main: string;
  readonly others: readonly string[];
}

const MOST_ALTERNATIVES = 10;
const WORDS =
  /[\s([]*(?:\b(?:or|oder|ou|oppure|of(?=\s+[A-Z0-9]))\b|\bequiv(?:alent)?s?\b\.?:?|\balso\b:?|\bsubs?(?:titutes?)?\b\.?:?|\balt(?:ernative(?:ly|s)?)?\b\.?:?|\bersatz\b:?|\bremplacement\b:?)\s*/i;

/** @param text after tidyValueText; @param kind what the line is for, where known */
export function splitAlternatives(text: string, kind: PartKind | null): Alternatives {
  const [first = '', ...worded] = text
    .split(WORDS)
    .map(withoutBrackets)
    .filter((piece) => piece !== '');
  const aside = valueInBrackets(first, kind);
  const [main = '', ...slashed] = splitSlash(aside.main, kind);
  const others = [...slashed, ...aside.others, ...worded].flatMap((piece) => splitSlash(piece, kind));
  return { main, others: others.filter((piece) => isChoice(piece, kind)).slice(0, MOST_ALTERNATIVES) };
}

function withoutBrackets(piece: string): string {
  const trimmed = piece.replace(/^[\s,;:=|)\]]+|[\s,;:=|([]+$/g, '').trim();
  return /[([]/.test(trimmed) ? trimmed : trimmed.replace(/[)\]]+$/, '').trim();
}

/** `10k (15k)` names a second value; `100k (R12 see text)` is a remark. */
function valueInBrackets(text: string, kind: PartKind | null): Alternatives {
  const form = /^(\S[^([]*?)\s*[([]\s*([^)\]]{1,30}?)\s*[)\]]\s*$/.exec(text);
  const inside = form?.[2] ?? '';
  const isValue =
    /\d[\d.,]*\s?[A-Za-zΩ]/.test(inside) && readQuantity(inside, kind) !== null && !/^[RCLDQU]\d+$/i.test(inside);
  const isPart =
    /\d/.test(inside) && !/\s/.test(inside) && familyOf(inside) !== null && familyOf(form?.[1] ?? '') !== null;
  return form !== null && (isValue || isPart) ? { main: form[1] ?? '', others: [inside] } : { main: text, others: [] };
}

/** A slash or bar parts two numbers or two values, not a value from its rating (`10u/25V`) or a fraction (`1/4W`). */
function splitSlash(text: string, kind: PartKind | null): string[] {
  const pieces = text.split(/\s*[/|]\s*/);
  if (pieces.length < 2 || pieces.length > 5) return [text];
  const allParts =
    pieces.every((piece) => familyOf(piece) !== null || /^[A-Z]{1,5}\d{2,5}[A-Z]{0,4}$/i.test(piece)) &&
    pieces.some((piece) => familyOf(piece) !== null);
  if (allParts) return pieces;
  const values = pieces.map((piece) => (/\d\s?[A-Za-zΩ]/.test(piece) ? readQuantity(piece, kind) : null));
  const unit = values[0]?.quantity.unit;
  const comparable = unit === 'ohm' || unit === 'farad' || unit === 'henry' || unit === 'hertz';
  return comparable && values.every((value) => value?.quantity.unit === unit) ? pieces : [text];
}

function isChoice(piece: string, kind: PartKind | null): boolean {
  if (!/\d/.test(piece)) return false;
  if (familyOf(piece) !== null) return true;
  const [head = ''] = piece.split(/[\s(,;]+/);
  return (
    readQuantity(head.replace(/^[ABCDW](?=\d)|(?<=[kKM\d])[ABCD]$/g, ''), kind) !== null ||
    /^(?=.*\d)(?=.*[A-Za-z])[A-Za-z0-9][A-Za-z0-9.+#_-]{2,}$/.test(head)
  );
}

/** `1M to 2M2`, `100k - 220k`, `47k…100k`: either of them will do. Null where the text is no such span. */
export function rangeIn(text: string, kind: PartKind): { low: Quantity; high: Quantity; highText: string } | null {
  const form =
    /^(\S+(?: [kKMGnupm]?(?:Ω|F|H|Hz|ohms?))?)\s*(?:\bto\b|\bbis\b|\btot\b|\ba\b|\.\.+)\s*(\d\S*|[Rnpu.]\d\S*)/i.exec(
      text,
    ) ?? /^([^\s-]+)\s?-\s?(\d[^\s-]*)$/.exec(text);
  if (form === null) return null;
  const highText = form[2] ?? '';
  const low = readQuantity(form[1] ?? '', kind)?.quantity;
  const high = readQuantity(highText, kind)?.quantity;
  if (low === undefined || high === undefined || low.unit !== high.unit || compareQuantity(low, high) >= 0) return null;
  return { low, high, highText };
}

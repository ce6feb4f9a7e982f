/** Designators as people write them: R1-R4, R1..4, R1–R4, R1 R2, R1/R2, C1-C3, C10, M0:C1, U$1. */

/** Most designators one range may give; a longer one is a slip of the keyboard. */
const LONGEST_RANGE = 500;

const PREFIX = '(?:[A-Za-z]{1,5}\\$?|[A-Z]\\d?:[A-Z]{1,4})';
const ONE = new RegExp(`^(${PREFIX})[-_ ]?(\\d{1,5})([A-Za-z]?)$`);
const RANGE = new RegExp(
  `^(${PREFIX})[-_]?(\\d{1,5})\\s*(?:-|–|—|\\.{2,3}|…|~|:|\\bto\\b|\\bbis\\b|\\ba\\b|\\bthru\\b)\\s*(${PREFIX})?[-_]?(\\d{1,5})$`,
  'i',
);

/** A whole cell in which ranges are spelled with blanks (`J1- J6`) or words, brought to one spelling. */
function tidy(text: string): string {
  return (
    text
      .normalize('NFKC')
      // A remark in brackets, such as J5 (red stripe), names nothing; (R1, R2) does.
      .replace(/\s*\((?=[^)]*[A-Za-z]{3})(?![^)]*\d)[^)]*\)/g, ' ')
      .replace(/[\u2010-\u2015]/g, '-')
      .replace(/\s*(-|\.{2,3}|…)\s*(?=[A-Za-z]{0,4}\d)/g, '$1')
      .replace(/(\d)\s+(?:to|bis|thru|through)\s+(?=[A-Za-z]{0,4}\d)/gi, '$1-')
  );
}

export interface Designators {
  readonly list: readonly string[];
  /** Every piece looked like a designator. */
  readonly clean: boolean;
}

/** Expands a designator cell; pieces that are no designator are kept as words (a panel label such as RATE). */
export function expandDesignators(text: string): Designators {
  const cell = tidy(text.trim());
  if (cell === '' || cell === '-') return { list: [], clean: true };
  if (!/\d/.test(cell)) return { list: cell.split(/\s*[,;]\s*/).filter((piece) => piece !== ''), clean: false };
  const list: string[] = [];
  let clean = true;
  let prefix = '';
  for (const piece of cell.split(/\s*[,;&+/]\s*|\s+(?:and|und|et|y|en|e)\s+|\s+/i)) {
    if (piece === '') continue;
    const expanded = expandPiece(piece, prefix);
    if (expanded === null) {
      clean = false;
      list.push(piece);
      continue;
    }
    prefix = expanded.prefix;
    list.push(...expanded.list);
  }
  return { list: [...new Set(list)], clean };
}

function expandPiece(piece: string, prefix: string): { list: string[]; prefix: string } | null {
  const range = RANGE.exec(piece);
  if (range) {
    const [, head = '', from = '', otherHead, to = ''] = range;
    const [low, high] = [Number(from), Number(to)];
    if (
      (otherHead === undefined || otherHead.toUpperCase() === head.toUpperCase()) &&
      high >= low &&
      high - low < LONGEST_RANGE
    ) {
      return { prefix: head, list: Array.from({ length: high - low + 1 }, (_, index) => `${head}${low + index}`) };
    }
    return null;
  }
  const one = ONE.exec(piece);
  if (one) return { prefix: one[1] ?? '', list: [piece.replace(/\s+/g, '')] };
  // `R1, 2, 4-6`: the letters stand for what follows.
  const bare = /^(\d{1,5})(?:[-.]{1,3}(\d{1,5}))?$/.exec(piece);
  if (bare && prefix !== '')
    return bare[2] === undefined
      ? { prefix, list: [`${prefix}${bare[1]}`] }
      : expandPiece(`${prefix}${bare[1]}-${bare[2]}`, prefix);
  return null;
}

/** Whether a cell is made of designators with a usual prefix: what tells the column by its content. */
export function looksLikeDesignators(text: string): boolean {
  const cell = text.trim();
  if (cell === '' || cell.length > 4_000) return false;
  const { list, clean } = expandDesignators(cell);
  return clean && list.length > 0 && list.every((one) => kindOfDesignator(one) !== null);
}

const KINDS: readonly (readonly [RegExp, string])[] = [
  [/^(?:RN|RA|RP|R)$/, 'resistor'],
  [/^(?:CE|CP|C)$/, 'capacitor'],
  [/^(?:FB|FER|L)$/, 'inductor'],
  [/^(?:LED|LD)$/, 'led'],
  [/^(?:ZD|VD|CR|D)$/, 'diode'],
  [/^(?:Q|VT|TQ|QP|QN)$/, 'transistor'],
  [/^(?:TRIM|TRM|TR|TM|VRT|TP[OT])$/, 'trimmer'],
  [/^(?:RV|VR|POT|PT|P)$/, 'potentiometer'],
  [/^(?:OK|OC|OPTO|VTL)$/, 'optocoupler'],
  [/^(?:U\$|IC|U|N|A)$/, 'ic'],
  [/^(?:VREG|REG)$/, 'regulator'],
  [/^(?:Y|XTAL|QZ|OSC)$/, 'crystal'],
  [/^(?:JP|JACK|JK|CONN?|CN|SKT|SK|HDR|PL|PWR|X|J)$/, 'connector'],
  [/^(?:SW|ENC|S)$/, 'switch'],
  [/^(?:PTC|NTC|TH|RT)$/, 'thermistor'],
  [/^F$/, 'fuse'],
  [/^(?:TF|TX)$/, 'transformer'],
  [/^T$/, 'transistor'],
  [/^(?:MH|HW|H|MP|KNOB|KN|SCR|NUT|HS)$/, 'hardware'],
  [/^(?:PCB|BRD)$/, 'pcb'],
  [/^(?:TP|K|RE|RL|BT|BAT|MK|MIC|SP|LS|M|W|G|FID|FD|Z|V|SJ|E|MOD|DISP|OLED|LCD|B|DS|BR)$/, 'other'],
];

/** The kind that the letters stand for (IEC 81346 and IEEE 315 letters, and what European lists use); null for no designator. */
export function kindOfDesignator(designator: string): string | null {
  const match =
    /^(?:[A-Z]\d?:)?([A-Za-z]{1,5}\$?)[-_]?\d{1,5}[A-Za-z]?$/.exec(designator) ??
    // PT-CV1: the letters, then the panel's word.
    /^([A-Z]{2,4})[-_][A-Z]{1,8}\d{0,3}$/.exec(designator);
  const letters = match?.[1]?.toUpperCase();
  if (letters === undefined) return null;
  return KINDS.find(([pattern]) => pattern.test(letters))?.[1] ?? null;
}

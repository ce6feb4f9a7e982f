/** What kind of part a row asks for, from the letters of its designators, words in its cells, its number and its section. */
import { familyOf } from '@/lib/electronics/families/family-of';
import { PART_KINDS, type PartKind } from '@/lib/electronics/part-spec';
import { firstOf, KIND_WORDS } from '@/lib/electronics/part-words';
import { readPartText } from '@/lib/electronics/read-part-text';
import { kindOfDesignator } from './designators';

export interface KindSigns {
  readonly designators: readonly string[];
  /** The cell that names the part. */
  readonly source: string;
  readonly kind: string;
  readonly description: string;
  readonly package: string;
  readonly notes: string;
  /** What the heading row of the section says. */
  readonly section: PartKind | null;
}

/** A part number that is known wins; then words; then the letters of the designator; then section and value. */
export function kindOfRow(signs: KindSigns): PartKind {
  const letters = signs.designators.map((one) => kindOfDesignator(one)).find((one) => one !== null) ?? null;
  const byLetters = PART_KINDS.find((one) => one === letters) ?? null;
  const byColumn = firstOf(KIND_WORDS, signs.kind);
  // A pot drawn in a trimmer's case: the taper that only pots have tells.
  const cased = kindInWords(signs.package);
  const byCase = cased === 'trimmer' && TAPERED.test(signs.source) ? null : cased;
  const said = kindInWords(signs.source) ?? kindInWords(signs.description);
  const byWords =
    said === 'potentiometer' && byCase === 'trimmer' ? byCase : (said ?? byCase ?? kindInWords(signs.notes));
  const isValue =
    byLetters !== null && ['resistor', 'capacitor', 'inductor', 'potentiometer', 'trimmer'].includes(byLetters);
  const family = isValue || byColumn === 'resistor' || byColumn === 'capacitor' ? null : familyOf(signs.source);
  if (family && compatible(byLetters, family.kind)) return family.kind;
  if (byColumn !== null && compatible(byLetters, byColumn)) return refine(byColumn, byWords);
  if (byLetters !== null)
    return byWords !== null && byWords !== byLetters && narrows(byLetters, byWords) ? byWords : byLetters;
  if (byColumn !== null) return refine(byColumn, byWords);
  if (byWords !== null) return byWords;
  if (signs.section !== null) return signs.section;
  if (family) return family.kind;
  const guessed = readPartText(signs.source, {}).kind;
  return guessed ?? 'other';
}

/** Kinds that the same letters are used for, so that words or a part number may say which. */
const SHARED: Readonly<Partial<Record<PartKind, readonly PartKind[]>>> = {
  resistor: ['thermistor', 'potentiometer', 'trimmer'],
  potentiometer: ['trimmer', 'connector', 'thermistor', 'resistor', 'fuse', 'switch'],
  led: ['hardware'],
  trimmer: ['potentiometer', 'transistor', 'transformer'],
  diode: ['led', 'ic', 'regulator'],
  transistor: ['crystal', 'regulator', 'ic', 'transformer', 'trimmer', 'diode'],
  ic: ['regulator', 'optocoupler', 'connector', 'other', 'pcb', 'crystal'],
  connector: ['crystal', 'ic', 'switch', 'hardware'],
  switch: ['connector', 'hardware'],
  inductor: ['led'],
  fuse: ['inductor', 'hardware'],
  hardware: ['connector', 'pcb'],
  other: [
    'connector',
    'switch',
    'optocoupler',
    'transformer',
    'crystal',
    'diode',
    'hardware',
    'pcb',
    'regulator',
    'ic',
    'led',
  ],
  crystal: ['ic'],
  capacitor: [],
  optocoupler: ['ic'],
};

/** B100k, 10kA. */
const TAPERED = /(?:^|\s)(?:[ABCW]\d+(?:[.,]\d+)?[kM]|\d+(?:[.,]\d+)?[kM][ABCW])\b/i;

/** `LED_red`, `LEDmsk`, `Conn_01x05`: names of symbols and cases join their words. */
function kindInWords(text: string): PartKind | null {
  return firstOf(KIND_WORDS, text.replaceAll('_', ' ').replace(/\bLED(?=[a-z])/g, 'LED '));
}

const narrows = (letters: PartKind, words: PartKind): boolean => SHARED[letters]?.includes(words) ?? false;
const compatible = (letters: PartKind | null, kind: PartKind): boolean =>
  letters === null || letters === kind || narrows(letters, kind);
const refine = (general: PartKind, words: PartKind | null): PartKind =>
  words !== null && narrows(general, words) ? words : general;

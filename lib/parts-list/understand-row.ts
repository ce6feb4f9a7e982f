/** One row under known columns to a line, a row that is no part, or a line with questions. */
import { familyOf } from '@/lib/electronics/families/family-of';
import type { PartKind, PartSpec } from '@/lib/electronics/part-spec';
import { firstOf, KIND_WORDS } from '@/lib/electronics/part-words';
import { readPartText } from '@/lib/electronics/read-part-text';
import type { TaperConvention } from '@/lib/electronics/read-taper';
import { toNumber } from '@/lib/electronics/quantity';
import type { Segment } from './columns';
import { expandDesignators, kindOfDesignator } from './designators';
import type { Role } from './heading-words';
import { kindOfRow } from './kind-of-row';
import { isFitted, quantityIn } from './quantity-and-fitting';
import { columnLetters, type TableRow } from './table';

export interface PartsListLine {
  readonly row: number;
  readonly sheet?: string;
  readonly designators: readonly string[];
  /** As the list states it; null where it states none. */
  readonly quantity: number | null;
  readonly fitted: boolean;
  readonly kind: PartKind;
  readonly value: { readonly si: number; readonly unit: string } | null;
  readonly partNumber: string | null;
  readonly alternatives: readonly string[];
  readonly text: string;
  readonly spec: PartSpec;
  readonly package: string | null;
  readonly notes: string;
}
export interface NotLine {
  readonly row: number;
  readonly sheet?: string;
  readonly why: string;
  /** What stands there, cells apart. */
  readonly text: string;
}
export interface Question {
  readonly row: number;
  readonly sheet?: string;
  readonly column?: string;
  readonly code: string;
  readonly ask: string;
  readonly options: readonly string[];
}
export type Understood =
  | { readonly line: PartsListLine; readonly questions: readonly Question[] }
  | { readonly notLine: NotLine };

const TOTAL = /^(?:grand\s+)?(?:total|sum|summe|gesamt(?:summe)?|subtotal|somme|totale|totaal|zwischensumme|suma)\b/i;
/** `Vertical card holder` in the place of a designator describes; RATE and `Main out` are a panel's words. */
const SENTENCE = /^(?=.*[a-z]{3})\S+(?:\s+\S+){2,}$/;
const ARTWORK = /^(?:outline|logo|artwork|fiducial|board outline|silkscreen|frame|\*{2,}.*)$/i;

export const textOf = (row: TableRow): string => row.cells.filter((cell) => cell !== '').join(' · ');

/** What one run over a list remembers: the section it is in, and texts it has read already. */
export class RowReader {
  private section: PartKind | null = null;
  private readonly read = new Map<string, PartSpec>();
  private readonly taperConvention: TaperConvention;
  private readonly sheet: string | null;

  constructor(sheet: string | null, taperConvention: TaperConvention) {
    this.sheet = sheet;
    this.taperConvention = taperConvention;
  }

  startSegment(): void {
    this.section = null;
  }

  understand(row: TableRow, segment: Segment): Understood {
    const place = this.sheet === null ? { row: row.row } : { row: row.row, sheet: this.sheet };
    const notLine = (why: string): Understood => ({ notLine: { ...place, why, text: textOf(row) } });
    const { columns } = segment;
    const filled = row.cells.filter((cell) => cell !== '');
    const text = (role: Role) =>
      columns
        .filter((column) => column.role === role)
        .map((column) => row.cells[column.index] ?? '')
        .filter((cell) => cell !== '')
        .join(' ');
    if (columns.length === 0)
      return notLine(filled.length === 1 ? 'title or note, no part' : 'above the heading, no part');
    if (
      filled.some((cell) => TOTAL.test(cell)) &&
      !columns.some(
        (column) =>
          column.role === 'designators' &&
          expandDesignators(row.cells[column.index] ?? '').list.some((one) => kindOfDesignator(one) !== null),
      )
    )
      return notLine('total, no part');
    const places = text('designators');
    const isSentence =
      SENTENCE.test(places) && expandDesignators(places).list.every((one) => kindOfDesignator(one) === null);
    const cells = {
      designators: isSentence ? '' : places,
      quantity: text('quantity'),
      value: text('value'),
      description: [text('description'), isSentence ? places : ''].filter((piece) => piece !== '').join(' '),
      kind: text('kind'),
      package: text('package'),
      notes: text('notes'),
      number: text('part-number'),
    };
    const hasDesignators = columns.some((column) => column.role === 'designators');
    const section = this.sectionOf(filled, cells.designators, hasDesignators);
    if (section !== null) return notLine(section);
    const naming = cells.value || cells.description || cells.number || cells.kind || cells.package;
    if (naming === '' && cells.designators === '') return notLine('no part: nothing names one');
    if (hasDesignators && cells.designators === '' && cells.quantity === '' && filled.length <= 2)
      return notLine('note, no part');
    if (
      cells.designators === '' &&
      cells.quantity === '' &&
      hasDesignators &&
      columns.some((column) => column.role === 'quantity')
    )
      return notLine('note, no part: neither designator nor quantity');
    if (ARTWORK.test(naming) && cells.quantity === '' && kindOfDesignator(cells.designators) === null)
      return notLine('artwork of the board, no part');
    return this.line(row, segment, cells, place);
  }

  /** A row of one cell that names a kind opens a section; any other lone text is a title or a note. */
  private sectionOf(filled: readonly string[], designators: string, hasDesignators: boolean): string | null {
    const [only = ''] = filled;
    if (filled.length !== 1) return null;
    if (designators !== '' && expandDesignators(designators).list.every((one) => kindOfDesignator(one) !== null))
      return null;
    const kind = firstOf(KIND_WORDS, only);
    if (kind !== null && only.length < 40 && !/\d/.test(only)) {
      this.section = kind;
      return 'section, no part';
    }
    return hasDesignators || /\s/.test(only) || only.length > 20 || !/\d/.test(only) ? 'title or note, no part' : null;
  }

  private line(
    row: TableRow,
    { columns }: Segment,
    cells: Record<
      'designators' | 'quantity' | 'value' | 'description' | 'kind' | 'package' | 'notes' | 'number',
      string
    >,
    place: { row: number; sheet?: string },
  ): Understood {
    const letterOf = (role: Role) => {
      const column = columns.find((one) => one.role === role);
      return column ? columnLetters(column.index) : undefined;
    };
    const questions: Question[] = [];
    const ask = (code: string, said: string, options: readonly string[], role: Role) => {
      const column = letterOf(role);
      questions.push({ ...place, ...(column === undefined ? {} : { column }), code, ask: said, options });
    };
    const { list: designators } = expandDesignators(cells.designators);
    const quantity = quantityIn(cells.quantity, place, letterOf('quantity') ?? 'A');
    const source = cells.value || cells.description || cells.number || cells.kind || cells.package;
    const kind = kindOfRow({ ...cells, designators, source, section: this.section });
    const wholeText = [
      source,
      cells.value === '' ? '' : cells.notes,
      cells.value !== '' && cells.description !== source ? cells.description : '',
    ]
      .filter((piece) => piece !== '')
      .join(' ');
    const main = this.specOf(source, kind);
    const around = wholeText === source ? main : this.specOf(wholeText, kind);
    const spec = merged(main, around, cells.package, kind);
    const remarks = [cells.value, cells.notes, cells.description, cells.quantity, cells.package];
    const fitted = spec.fitted && isFitted(columns, row, remarks);
    const number =
      cells.number !== '' && /\d/.test(cells.number) && !/^\d{1,3}$/.test(cells.number) ? cells.number : null;
    const ownNumber = VOLTS_ONLY.test(source)
      ? (this.specOf(cells.description, kind).partNumber ?? numberOf(kind, main, source, number))
      : numberOf(kind, main, source, number);
    for (const doubt of fitted ? main.doubts : []) ask(doubt.code, doubt.ask, doubt.options, 'value');
    const named = designators.filter((one) => kindOfDesignator(one) !== null);
    const count = named.length === designators.length ? designators.length : 0;
    if (quantity !== null && count > 0 && quantity !== count && fitted) {
      ask(
        'quantity-differs',
        `${count === 1 ? 'One designator' : `${count} designators`} (${shorten(designators)}), but column ${letterOf('quantity') ?? '?'} asks for ${quantity}. Which is right?`,
        [String(count), String(quantity)],
        'quantity',
      );
    }
    const read = main.value ?? (main.partNumber === null ? around.value : null);
    const value = NAMED_BY_NUMBER.includes(kind) ? null : read;
    return {
      line: {
        ...place,
        designators,
        quantity,
        fitted,
        kind,
        value: value === null ? null : { si: toNumber(value), unit: value.unit },
        partNumber: ownNumber,
        alternatives: spec.alternatives,
        text: source,
        spec: {
          ...spec,
          kind,
          // What other cells add belongs to what the line asks for.
          text: addsTo(main, spec) ? wholeText.slice(0, MOST_SPEC_TEXT) : source,
          value,
          partNumber: ownNumber,
          fitted,
          family: spec.family ?? (ownNumber === null ? null : (familyOf(ownNumber)?.familyId ?? null)),
        },
        package: spec.package ?? (cells.package === '' ? null : cells.package.slice(0, 60)),
        notes: [cells.notes, cells.description === source ? '' : cells.description]
          .filter((piece) => piece !== '')
          .join('; ')
          .slice(0, 300),
      },
      questions,
    };
  }

  private specOf(text: string, kind: PartKind): PartSpec {
    const key = `${kind}\u0001${text}`;
    const known = this.read.get(key);
    if (known) return known;
    const spec = readPartText(text, { kind, taperConvention: this.taperConvention });
    this.read.set(key, spec);
    return spec;
  }
}

/** Kinds whose figures are part of their number. */
const NAMED_BY_NUMBER: readonly PartKind[] = [
  'ic',
  'transistor',
  'diode',
  'connector',
  'hardware',
  'regulator',
  'switch',
  'led',
  'optocoupler',
];

const MOST_SPEC_TEXT = 300;

const RATINGS = [
  'tolerancePercent',
  'ratedVolts',
  'ratedWatts',
  'ratedAmperes',
  'dielectric',
  'technology',
  'taper',
] as const;

const addsTo = (before: PartSpec, after: PartSpec): boolean => RATINGS.some((one) => before[one] !== after[one]);

function shorten(designators: readonly string[]): string {
  return designators.length <= 3 ? designators.join(', ') : `${designators[0]} … ${designators.at(-1)}`;
}

/** Ratings and words may stand in other cells; the value and number come from the cell that names the part. */
function merged(main: PartSpec, around: PartSpec, packageCell: string, kind: PartKind): PartSpec {
  const cased = packageCell === '' ? null : readPartText(packageCell, { kind });
  return {
    ...main,
    tolerancePercent: main.tolerancePercent ?? around.tolerancePercent,
    ratedVolts: main.ratedVolts ?? around.ratedVolts,
    ratedWatts: main.ratedWatts ?? around.ratedWatts,
    ratedAmperes: main.ratedAmperes ?? around.ratedAmperes,
    dielectric: main.dielectric ?? around.dielectric,
    technology: main.technology ?? around.technology,
    taper: main.taper ?? around.taper,
    mounting: main.mounting ?? cased?.mounting ?? around.mounting,
    package: main.package ?? cased?.package ?? around.package,
    fitted: main.fitted && around.fitted,
  };
}

/** The number that names the part: where the part is named, else in the column of part numbers. */
function numberOf(kind: PartKind, main: PartSpec, source: string, column: string | null): string | null {
  return numberFor(kind, main, source) ?? (main.value === null ? column : null);
}

/** `10V` of a reference whose description says LM4040 is what it gives, not what it is. */
const VOLTS_ONLY = /^[+-]?\d+(?:[.,]\d+)?\s*V?$/i;

/** A number only where the kind has numbers: `510` on a resistor is a value. */
function numberFor(kind: PartKind, spec: PartSpec, source: string): string | null {
  if (spec.partNumber !== null) return spec.partNumber;
  if (['ic', 'transistor', 'diode', 'regulator', 'optocoupler'].includes(kind) && /\d/.test(source))
    return source.split(/\s+/)[0] ?? null;
  return null;
}

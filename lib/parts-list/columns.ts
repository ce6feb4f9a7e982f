/** Which column holds what: by its heading's words, and by what stands in it where the heading lies or is missing. */
import { readQuantity } from '@/lib/electronics/read-quantity';
import { tidyValueText } from '@/lib/electronics/tidy-value-text';
import { familyOf } from '@/lib/electronics/families/family-of';
import { looksLikeDesignators } from './designators';
import { type Role, roleOfHeading, tidyHeading } from './heading-words';
import type { TableRow } from './table';

export interface Column {
  readonly index: number;
  readonly heading: string;
  readonly role: Role;
  /** Why it was taken for that, in a sentence a builder reads. */
  readonly because: string;
}

/** A stretch of rows under one heading. */
export interface Segment {
  readonly heading: TableRow | null;
  readonly columns: readonly Column[];
  readonly rows: readonly TableRow[];
}

const SAMPLE_ROWS = 300;

/** How much a row looks like a heading: cells whose words point to different roles, against cells that look like data. */
export function headingScore(row: TableRow): number {
  const roles = new Set<Role>();
  let data = 0;
  let words = 0;
  for (const cell of row.cells) {
    if (cell === '') continue;
    words += 1;
    const role = roleOfHeading(cell);
    if (role !== null) roles.add(role);
    else if (/^[\d.,\s]+$/.test(cell) || looksLikeDesignators(cell) || readQuantity(cell, null) !== null) data += 1;
  }
  const telling = [...roles].filter((role) => role !== 'ignore' && role !== 'index' && role !== 'price').length;
  if (telling < 2 && !(telling === 1 && words === 2 && roles.size === 2)) return 0;
  return telling * 2 + roles.size - data * 2 - (words > roles.size + 4 ? 1 : 0);
}

const LEAST_SCORE = 4;

/** Cuts a sheet at its heading rows; rows before the first one have no heading of their own. */
export function segmentsOf(rows: readonly TableRow[], fixed: Readonly<Record<number, Role>> | null): Segment[] {
  const segments: { heading: TableRow | null; rows: TableRow[] }[] = [{ heading: null, rows: [] }];
  for (const row of rows) {
    if (headingScore(row) >= LEAST_SCORE) segments.push({ heading: row, rows: [] });
    else segments.at(-1)?.rows.push(row);
  }
  const [before, ...headed] = segments;
  const leading = before && before.rows.length > 0 ? [before] : [];
  return [
    ...(headed.length > 0
      ? leading.map((segment) => ({ ...segment, columns: [] as Column[] }))
      : leading.map(underUnknownHeading).map((segment) => ({
          ...segment,
          columns: columnsOf(segment.heading, segment.rows, fixed),
        }))),
    ...headed.map((segment) => ({ ...segment, columns: columnsOf(segment.heading, segment.rows, fixed) })),
  ];
}

/** A first row of words without a figure, over columns full of figures, is a heading in words we don't know. */
function underUnknownHeading(segment: { heading: TableRow | null; rows: TableRow[] }): typeof segment {
  const [first, ...rest] = segment.rows;
  const words = first?.cells.filter((cell) => cell !== '') ?? [];
  if (!first || words.length < 2 || rest.length === 0 || words.some((cell) => /\d/.test(cell) || cell.length > 40))
    return segment;
  const below = rest.slice(0, SAMPLE_ROWS);
  const figures = first.cells.filter((cell, index) => {
    const cells = below.map((row) => row.cells[index] ?? '').filter((one) => one !== '');
    return (
      cell !== '' && cells.length >= below.length / 2 && cells.filter((one) => /\d/.test(one)).length > cells.length / 2
    );
  });
  return figures.length >= 2 ? { heading: first, rows: rest } : segment;
}

interface Content {
  readonly filled: number;
  readonly designators: number;
  readonly whole: number;
  readonly values: number;
  readonly families: number;
  readonly volts: number;
  readonly distinct: number;
  readonly ascending: boolean;
}

function contentOf(index: number, rows: readonly TableRow[]): Content {
  const cells = rows
    .slice(0, SAMPLE_ROWS)
    .map((row) => row.cells[index] ?? '')
    .filter((cell) => cell !== '');
  const count = (test: (cell: string) => boolean) =>
    cells.length === 0 ? 0 : cells.filter(test).length / cells.length;
  const numbers = cells.map(Number);
  return {
    filled: rows.length === 0 ? 0 : cells.length / Math.min(rows.length, SAMPLE_ROWS),
    designators: count(looksLikeDesignators),
    whole: count((cell) => /^\d{1,5}(?:\.0+)?\s*[x×]?$/.test(cell)),
    values: count((cell) => looksLikeValue(cell)),
    families: count((cell) => /[A-Za-z]/.test(cell) && familyOf(cell) !== null),
    volts: count((cell) => /^\d+(?:[.,]\d+)?\s*V(?:DC)?$/i.test(cell)),
    distinct: new Set(cells).size,
    ascending:
      cells.length > 2 &&
      numbers.every(
        (value, place) => Number.isInteger(value) && (place === 0 || value === (numbers[place - 1] ?? 0) + 1),
      ),
  };
}

function looksLikeValue(cell: string): boolean {
  const first = tidyValueText(cell).split(/[\s/,;(]/)[0] ?? '';
  return (
    !/^\d+$/.test(first) &&
    (readQuantity(first, null) !== null ||
      readQuantity(first, 'resistor') !== null ||
      /^\d+(?:[.,]\d+)?[pnu]F?$/i.test(first))
  );
}

function columnsOf(
  heading: TableRow | null,
  rows: readonly TableRow[],
  fixed: Readonly<Record<number, Role>> | null,
): Column[] {
  const width = Math.max(heading?.cells.length ?? 0, ...rows.slice(0, SAMPLE_ROWS).map((row) => row.cells.length));
  const data = rows.filter((row) => row.cells.filter((cell) => cell !== '').length > 1);
  const columns = Array.from({ length: Math.min(width, 200) }, (_, index) => {
    const words = heading?.cells[index] ?? '';
    return { index, words, hint: words === '' ? null : roleOfHeading(words), content: contentOf(index, data) };
  });
  const roles = new Map<number, { role: Role; because: string }>();
  const give = (index: number, role: Role, because: string) => void roles.set(index, { role, because });
  const free = () => columns.filter((column) => !roles.has(column.index));
  const said = (column: { words: string }) => (column.words === '' ? 'no heading' : `“${column.words}”`);

  if (fixed) for (const [index, role] of Object.entries(fixed)) give(Number(index), role, 'you said so');

  // Designators: what stands there tells more than the heading, which may be "Part", "Index" or "Location".
  if (![...roles.values()].some((one) => one.role === 'designators')) {
    const byContent = free()
      .filter((column) => column.content.designators >= 0.5 && column.content.filled >= 0.15)
      .sort(
        (a, b) =>
          Number(b.hint === 'designators') - Number(a.hint === 'designators') ||
          b.content.designators * b.content.filled - a.content.designators * a.content.filled,
      )[0];
    const byWords = free().find(
      (column) => column.hint === 'designators' && column.content.filled > 0 && column.content.whole < 0.8,
    );
    const chosen =
      byContent && (byContent.hint === 'designators' || !byWords || byWords.content.designators < 0.3)
        ? byContent
        : byWords;
    if (chosen)
      give(
        chosen.index,
        'designators',
        chosen.content.designators >= 0.5 ? `${said(chosen)}: looks like R1, C2` : `${said(chosen)} says so`,
      );
  }
  // Quantity: whole numbers under a heading that says so; else whole numbers that don't just count the rows.
  if (![...roles.values()].some((one) => one.role === 'quantity')) {
    const byWords = free()
      .filter((column) => column.hint === 'quantity' && column.content.filled > 0)
      .sort((a, b) => b.content.whole * b.content.filled - a.content.whole * a.content.filled)[0];
    const byContent =
      byWords ??
      (heading === null
        ? free().filter(
            (column) =>
              column.content.whole >= 0.8 &&
              column.content.filled >= 0.5 &&
              !column.content.ascending &&
              Math.max(...data.map((row) => Number(row.cells[column.index]) || 0)) <= 500,
          )[0]
        : undefined);
    if (byContent) give(byContent.index, 'quantity', `${said(byContent)}: whole numbers`);
  }
  if (![...roles.values()].some((one) => one.role === 'value')) giveValue(columns, free, give, said);
  for (const column of free()) {
    if (column.hint !== null && column.hint !== 'designators' && column.hint !== 'quantity' && column.hint !== 'value')
      give(column.index, column.hint, `${said(column)} says so`);
    else if (column.hint === 'value')
      give(column.index, column.content.volts >= 0.5 ? 'notes' : 'description', `${said(column)}, beside the value`);
    else if (column.hint === 'designators' && column.content.filled > 0)
      give(column.index, 'description', `${said(column)}, but no designators in it`);
    else if (column.hint === null && column.content.filled > 0)
      give(
        column.index,
        heading === null || column.words === '' ? 'notes' : 'ignore',
        column.words === '' ? 'no heading: read as remarks' : `${said(column)} is no heading we know`,
      );
    else give(column.index, 'ignore', 'empty');
  }
  return columns.map((column) => ({
    index: column.index,
    heading: column.words,
    ...(roles.get(column.index) ?? { role: 'ignore' as Role, because: 'empty' }),
  }));
}

type Sized = { index: number; words: string; hint: Role | null; content: Content };

/** The value column: so called and holding values or part numbers; where it is empty or holds volts, the one that names the part. */
function giveValue(
  columns: readonly Sized[],
  free: () => Sized[],
  give: (index: number, role: Role, because: string) => void,
  said: (column: { words: string }) => string,
): void {
  const worth = (column: Sized) => column.content.values + column.content.families;
  const named = free().filter((column) => column.hint === 'value' && column.content.filled > 0);
  const usable = named
    .filter((column) => column.content.volts < 0.5 && column.content.filled >= 0.2)
    .sort((a, b) => worth(b) * b.content.filled - worth(a) * a.content.filled)[0];
  if (usable) return give(usable.index, 'value', `${said(usable)} says so`);
  const other = free()
    .filter(
      (column) =>
        column.content.filled > 0 &&
        !['price', 'order-code', 'maker', 'fitted', 'quantity', 'index'].includes(column.hint ?? ''),
    )
    .map((column) => ({
      column,
      score:
        worth(column) *
          Math.min(1, column.content.filled) *
          (column.hint === 'package' || column.hint === 'ignore' || column.hint === 'notes' ? 0.3 : 1) +
        (column.hint === 'description' ? 0.15 : 0) +
        (column.hint === 'part-number' ? 0.05 : 0),
    }))
    .sort((a, b) => b.score - a.score || a.column.index - b.column.index)[0];
  if (other && other.score > 0.05)
    return give(other.column.index, 'value', `${said(other.column)}: holds values and part numbers`);
  const words = columns.find(
    (column) =>
      free().includes(column) &&
      (column.hint === 'description' || tidyHeading(column.words) === 'part') &&
      column.content.filled > 0,
  );
  if (words) give(words.index, 'value', `${said(words)}: names the part`);
}

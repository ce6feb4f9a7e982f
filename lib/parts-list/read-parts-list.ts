/**
 * Bytes of a parts list in, understood lines out. Pure but for the two libraries that know the file formats. What can't
 * be read at all is a problem with its place and cure; what can be read in two ways is a question beside its line.
 */
import type { TaperConvention } from '@/lib/electronics/read-taper';
import { type Column, segmentsOf } from './columns';
import { kindOfDesignator } from './designators';
import { COLUMN_ROLES, type Role } from './heading-words';
import { decodeText, sniff } from './read-bytes';
import { readDelimited } from './read-delimited';
import { looksLikeMarkdown, readMarkdown } from './read-markdown-table';
import { readWorkbook } from './read-workbook';
import { type PartsListProblem, ReadingStopped, type Table, type TableRow } from './table';
import { type NotLine, type PartsListLine, type Question, RowReader, textOf } from './understand-row';

export type { Column } from './columns';
export { COLUMN_ROLES, type Role } from './heading-words';
export type { PartsListProblem } from './table';
export type { NotLine, PartsListLine, Question } from './understand-row';

export interface ReadTable {
  readonly sheet: string | null;
  readonly columns: readonly Column[];
  readonly rows: readonly TableRow[];
}

export type ListFormat = 'workbook' | 'markdown' | 'text';

export interface PartsListReading {
  readonly ok: true;
  readonly format: ListFormat;
  /** Empty where the file has only one table. */
  readonly sheets: readonly string[];
  readonly tables: readonly ReadTable[];
  readonly lines: readonly PartsListLine[];
  readonly notLines: readonly NotLine[];
  readonly questions: readonly Question[];
}

export interface ReadingOptions {
  readonly fileName?: string;
  /** Roles a person gave, by sheet (null: the only one) and column from 0. */
  readonly columnRoles?: readonly { readonly sheet: string | null; readonly index: number; readonly role: string }[];
  readonly taperConvention?: TaperConvention;
  /** Called with rows done and rows in all, now and then. */
  readonly onProgress?: (done: number, total: number) => void;
  readonly signal?: AbortSignal;
}

const ROWS_BETWEEN_BREATHS = 2_000;

export async function readPartsList(
  bytes: Uint8Array,
  options: ReadingOptions = {},
): Promise<PartsListReading | PartsListProblem> {
  try {
    const { format, tables } = await tablesIn(bytes);
    return await readTables(format, tables, options);
  } catch (error) {
    if (error instanceof ReadingStopped) return error.problem;
    throw error;
  }
}

async function tablesIn(bytes: Uint8Array): Promise<{ format: ListFormat; tables: Table[] }> {
  if (sniff(bytes) === 'workbook') return { format: 'workbook', tables: await readWorkbook(bytes) };
  const text = decodeText(bytes);
  if (text.trim() === '')
    throw new ReadingStopped({
      code: 'empty',
      detail: 'The file holds nothing but blanks.',
      row: 1,
      column: 'A',
      cure: 'Save the list again and choose that file.',
    });
  return looksLikeMarkdown(text)
    ? { format: 'markdown', tables: [readMarkdown(text)] }
    : { format: 'text', tables: [readDelimited(text)] };
}

async function readTables(
  format: ListFormat,
  tables: readonly Table[],
  options: ReadingOptions,
): Promise<PartsListReading | PartsListProblem> {
  const total = tables.reduce((sum, table) => sum + table.rows.length, 0);
  const read: ReadTable[] = [];
  const lines: PartsListLine[] = [];
  const notLines: NotLine[] = [];
  const questions: Question[] = [];
  let done = 0;
  for (const table of tables) {
    const fixed = rolesGiven(table.sheet, options);
    const segments = segmentsOf(table.rows, fixed);
    const reader = new RowReader(table.sheet, options.taperConvention ?? 'ask');
    const bySegment: PartsListLine[][] = [];
    const asked: Question[] = [];
    for (const segment of segments) {
      reader.startSegment();
      const here: PartsListLine[] = [];
      if (segment.heading)
        notLines.push({
          row: segment.heading.row,
          ...(table.sheet === null ? {} : { sheet: table.sheet }),
          why: 'heading, no part',
          text: textOf(segment.heading),
        });
      for (const row of segment.rows) {
        const understood = reader.understand(row, segment);
        if ('line' in understood) {
          here.push(understood.line);
          asked.push(...understood.questions);
        } else notLines.push(understood.notLine);
        done += 1;
        if (done % ROWS_BETWEEN_BREATHS === 0) {
          options.onProgress?.(done, total);
          await new Promise((resume) => setImmediate(resume));
          if (options.signal?.aborted)
            throw new ReadingStopped({
              code: 'cancelled',
              detail: 'The reading was cancelled.',
              cure: 'Start it again.',
            });
        }
      }
      bySegment.push(here);
    }
    const repeated = repeatedSegments(bySegment);
    bySegment.forEach((here, index) => {
      if (!repeated.has(index)) lines.push(...here);
      else
        notLines.push(
          ...here.map((line) => ({
            row: line.row,
            ...(line.sheet === undefined ? {} : { sheet: line.sheet }),
            why: 'the same list again, grouped elsewhere in the file',
            text: line.text,
          })),
        );
    });
    const kept = new Set(bySegment.flatMap((here, index) => (repeated.has(index) ? [] : here.map((line) => line.row))));
    questions.push(...asked.filter((question) => kept.has(question.row)));
    const longest = segments.reduce((a, b) => (b.rows.length > a.rows.length ? b : a));
    read.push({ sheet: table.sheet, columns: longest.columns, rows: table.rows });
  }
  options.onProgress?.(total, total);
  if (lines.length === 0) {
    return {
      ok: false,
      code: 'no-parts',
      detail: 'No row of this file names a part.',
      row: tables[0]?.rows[0]?.row ?? 1,
      column: 'A',
      cure: 'Check that it is the parts list, with designators or quantities and a value or part number in each row.',
    };
  }
  const inOrder = (a: { row: number }, b: { row: number }) => a.row - b.row;
  return {
    ok: true,
    format,
    sheets: tables.flatMap((table) => table.sheet ?? []),
    tables: read,
    lines,
    notLines: tables.length === 1 ? notLines.sort(inOrder) : notLines,
    questions,
  };
}

/** Null where nobody said anything of this sheet. */
function rolesGiven(sheet: string | null, options: ReadingOptions): Record<number, Role> | null {
  const said = (options.columnRoles ?? []).filter((one) => one.sheet === sheet);
  const roles = said.flatMap(({ index, role }) =>
    COLUMN_ROLES.filter((known) => known === role).map((known): [number, Role] => [index, known]),
  );
  return roles.length === 0 ? null : Object.fromEntries(roles);
}

/** A list given twice in one file, one row a designator and then grouped: the grouped one is read. */
function repeatedSegments(segments: readonly (readonly PartsListLine[])[]): Set<number> {
  const repeated = new Set<number>();
  const designators = segments.map(
    (lines) => new Set(lines.flatMap((line) => line.designators.filter((one) => kindOfDesignator(one) !== null))),
  );
  segments.forEach((lines, index) => {
    const own = designators[index];
    if (!own || own.size < 3) return;
    segments.forEach((others, other) => {
      const theirs = designators[other];
      if (other === index || !theirs || repeated.has(other) || theirs.size < own.size * 0.9) return;
      const shared = [...own].filter((one) => theirs.has(one)).length;
      if (
        shared >= own.size * 0.9 &&
        (others.length < lines.length || (others.length === lines.length && other < index))
      )
        repeated.add(index);
    });
  });
  return repeated;
}

/**
 * Bytes of a parts list in, understood lines out. Pure but for the two libraries that know the file formats. What can't
 * be read at all is a problem with its place and cure; what can be read in two ways is a question beside its line.
 */
import type { TaperConvention } from '@/lib/electronics/read-taper';
import { blocksOf } from './blocks';
import { type Column, type Segment, segmentsOf } from './columns';
import { kindOfDesignator } from './designators';
import { COLUMN_ROLES, type Role, roleOfHeading } from './heading-words';
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

/** What the tables gave so far. */
interface Gathered {
  readonly tables: ReadTable[];
  readonly lines: PartsListLine[];
  readonly notLines: NotLine[];
  readonly questions: Question[];
}

async function readTables(
  format: ListFormat,
  tables: readonly Table[],
  options: ReadingOptions,
): Promise<PartsListReading | PartsListProblem> {
  const total = tables.reduce((sum, table) => sum + table.rows.length, 0);
  const gathered: Gathered = { tables: [], lines: [], notLines: [], questions: [] };
  const pace = paceOf(total, options);
  for (const table of tables) await readTable(table, gathered, options, pace);
  options.onProgress?.(total, total);
  const { lines, notLines, questions } = gathered;
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
  const sheets = tables.flatMap((table) => table.sheet ?? []);
  return { ok: true, format, sheets, tables: gathered.tables, lines, notLines, questions };
}

/** Called once a row: tells how far it is, lets other work in between, and stops when asked to. */
function paceOf(total: number, { onProgress, signal }: ReadingOptions): () => Promise<void> | undefined {
  let done = 0;
  return () => {
    done += 1;
    if (done % ROWS_BETWEEN_BREATHS !== 0) return undefined;
    onProgress?.(done, total);
    return new Promise((resume) => setImmediate(resume)).then(() => {
      if (signal?.aborted)
        throw new ReadingStopped({ code: 'cancelled', detail: 'The reading was cancelled.', cure: 'Start it again.' });
    });
  };
}

async function readTable(
  table: Table,
  into: Gathered,
  options: ReadingOptions,
  pace: () => Promise<void> | undefined,
): Promise<void> {
  const place = (row: number) => (table.sheet === null ? { row } : { row, sheet: table.sheet });
  const segments = segmentsOfSheet(table.rows, rolesGiven(table.sheet, options));
  const reader = new RowReader(table.sheet, options.taperConvention ?? 'ask');
  const bySegment: PartsListLine[][] = [];
  const notLines: NotLine[] = [];
  const asked: Question[] = [];
  for (const segment of segments) {
    reader.startSegment();
    const here: PartsListLine[] = [];
    const { heading } = segment;
    if (heading) notLines.push({ ...place(heading.row), why: 'heading, no part', text: textOf(heading) });
    for (const row of segment.rows) {
      const understood = reader.understand(row, segment);
      if ('line' in understood) {
        here.push(understood.line);
        asked.push(...understood.questions);
      } else notLines.push(understood.notLine);
      const breath = pace();
      if (breath) await breath;
    }
    bySegment.push(here);
  }
  const repeated = repeatedSegments(bySegment);
  const kept = bySegment.flatMap((lines, index) => (repeated.has(index) ? [] : lines));
  const again = bySegment.flatMap((lines, index) => (repeated.has(index) ? lines : []));
  const why = 'the same list again, grouped elsewhere in the file';
  notLines.push(...again.map(({ row, text }) => ({ ...place(row), why, text })));
  const rowsOfLines = new Set(kept.map((line) => line.row));
  into.lines.push(...kept);
  into.notLines.push(...eachRowOnce(notLines).filter((one) => !rowsOfLines.has(one.row)));
  into.questions.push(...asked.filter((question) => rowsOfLines.has(question.row)));
  into.tables.push({ sheet: table.sheet, columns: columnsShown(segments), rows: table.rows });
}

/** A parts list names its places or counts its parts. */
const COUNTING_ROLES: readonly (Role | null)[] = ['designators', 'quantity'];

/** Of tables side by side, those with a heading are lists; what stands beside them is something else. */
function segmentsOfSheet(rows: readonly TableRow[], fixed: Record<number, Role> | null): Segment[] {
  const blocks = blocksOf(rows).map((block) => segmentsOf(block, fixed));
  const headed = blocks.filter((segments) =>
    segments.some(({ heading }) => heading?.cells.some((cell) => COUNTING_ROLES.includes(roleOfHeading(cell)))),
  );
  return (headed.length > 0 ? headed : blocks).flat();
}

/** The columns of the longest stretch, and of the tables beside it. */
function columnsShown(segments: readonly Segment[]): readonly Column[] {
  const shown = new Map<number, Column>();
  for (const segment of [...segments].sort((a, b) => b.rows.length - a.rows.length)) {
    for (const column of segment.columns) {
      const before = shown.get(column.index);
      if (!before || (before.role === 'ignore' && column.role !== 'ignore')) shown.set(column.index, column);
    }
  }
  return [...shown.values()].sort((a, b) => a.index - b.index);
}

function eachRowOnce(notLines: readonly NotLine[]): NotLine[] {
  const byRow = new Map<number, NotLine>();
  for (const one of notLines) if (!byRow.has(one.row)) byRow.set(one.row, one);
  return [...byRow.values()].sort((a, b) => a.row - b.row);
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

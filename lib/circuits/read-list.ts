/** The reader's answer in the shape that a revision is written from. The only file here that knows the reader. */
import { type FieldProblem, Refusal } from '@/lib/api/problem';
import { type PartsListProblem, type PartsListReading, readPartsList } from '@/lib/parts-list/read-parts-list';
import { type ColumnCorrection, type KeptReading, MOST_KEPT_CELL_CHARACTERS, MOST_KEPT_ROWS } from './kept-reading';
import type { LineDraft, QuestionDraft } from './line-draft';
import { circuitUseIn } from './line-use';

export interface ReadList {
  readonly lines: readonly LineDraft[];
  readonly questions: readonly QuestionDraft[];
  readonly reading: KeptReading;
}

export interface ReadListOptions {
  readonly fileName: string;
  readonly columnRoles?: readonly ColumnCorrection[];
  readonly onProgress?: (done: number, total: number) => void;
  readonly signal?: AbortSignal;
}

export async function readList(
  bytes: Uint8Array,
  options: ReadListOptions,
): Promise<{ ok: true; list: ReadList } | { ok: false; problem: PartsListProblem }> {
  const read = await readPartsList(bytes, options);
  return read.ok ? { ok: true, list: listOf(read, options.columnRoles ?? []) } : { ok: false, problem: read };
}

function listOf(read: PartsListReading, columnRoles: readonly ColumnCorrection[]): ReadList {
  const lines = read.lines.map(
    (line): LineDraft => ({
      sheet: line.sheet ?? null,
      sourceRow: line.row,
      designators: line.designators,
      quantity: line.quantity ?? Math.max(1, line.designators.length),
      spec: line.spec,
      use: circuitUseIn(line.text),
    }),
  );
  const questions = read.questions.map(
    (asked): QuestionDraft => ({
      sheet: asked.sheet ?? null,
      sourceRow: asked.row,
      code: asked.code,
      ask: asked.ask,
      options: asked.options,
    }),
  );
  return { lines, questions, reading: keptOf(read, columnRoles) };
}

function keptOf(read: PartsListReading, columnRoles: readonly ColumnCorrection[]): KeptReading {
  let room = MOST_KEPT_ROWS;
  return {
    format: read.format,
    sheets: [...read.sheets],
    tables: read.tables.map((table) => {
      const rows = table.rows
        .slice(0, room)
        .map(({ row, cells }) => ({ row, cells: cells.map((cell) => cell.slice(0, MOST_KEPT_CELL_CHARACTERS)) }));
      room -= rows.length;
      return {
        sheet: table.sheet ?? null,
        columns: table.columns.map((column) => ({ ...column })),
        rows,
        rowCount: table.rows.length,
      };
    }),
    notLines: read.notLines.slice(0, MOST_KEPT_ROWS).map(({ row, sheet, why, text }) => ({
      row,
      sheet: sheet ?? null,
      why,
      text: text.slice(0, MOST_KEPT_CELL_CHARACTERS),
    })),
    notLineCount: read.notLines.length,
    columnRoles: [...columnRoles],
  };
}

/** What the person is told, with the place and the cure; the file itself is kept. */
export function refusalOfList(
  problem: PartsListProblem,
  kept: { readonly id: string; readonly fileName: string },
): Refusal {
  const place = [
    problem.sheet ? `sheet ${problem.sheet}` : null,
    problem.row ? `row ${problem.row}` : null,
    problem.column ? `column ${problem.column}` : null,
  ]
    .filter((one) => one !== null)
    .join(', ');
  const error: FieldProblem = { pointer: place, code: problem.code, detail: problem.detail };
  const detail = `${place === '' ? '' : `${place[0]?.toUpperCase()}${place.slice(1)}: `}${problem.detail} ${problem.cure} Nothing was changed; ${kept.fileName} is kept.`;
  return new Refusal('list.unreadable', detail, {
    errors: [error],
    more: {
      uploadId: kept.id,
      fileName: kept.fileName,
      code: problem.code,
      sheet: problem.sheet ?? null,
      row: problem.row ?? null,
      column: problem.column ?? null,
      cure: problem.cure,
    },
  });
}

const MOST_INLINE_ROWS = 5_000;
/** A zipped sheet packs about ten times; 300 kB of it may hold some 10,000 rows. */
const MOST_INLINE_ZIPPED_BYTES = 300_000;
const MOST_INLINE_BYTES = 2_000_000;

/** Long lists are read by the job process: in a request they would keep everybody else waiting. */
export function isLongList(bytes: Uint8Array): boolean {
  const zipped = bytes[0] === 0x50 && bytes[1] === 0x4b;
  if (zipped) return bytes.length > MOST_INLINE_ZIPPED_BYTES;
  if (bytes.length > MOST_INLINE_BYTES) return true;
  let rows = 0;
  for (const byte of bytes) if (byte === 0x0a) rows += 1;
  return rows > MOST_INLINE_ROWS;
}

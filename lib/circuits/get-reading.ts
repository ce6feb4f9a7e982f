/** How a list was read, for the import page: the table, each column's role and why, each row's understanding beside it. */
import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { revision, upload } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { notFound } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { USES } from '@/lib/electronics/stand-in/check';
import { columnReading, keptReading, notLine } from './kept-reading';
import { listQuestions, questionFields } from './list-questions';
import { partSpecSchema } from './part-spec-schema';
import { placeOf } from './store-lines';

const understood = z.object({
  id: id(),
  designators: z.array(z.string()),
  quantity: z.number().int(),
  fitted: z.boolean(),
  kind: z.string(),
  text: z.string(),
  use: z.enum(USES).nullable(),
  spec: partSpecSchema,
});

const readRow = z.object({
  row: z.number().int(),
  cells: z.array(z.string()),
  /** Usually one; two boards side by side give two. */
  lines: z.array(understood),
  /** Why the row is no part; null where it is one or the rows before say it. */
  notLine: z.string().nullable(),
  questionIds: z.array(id()),
});

const MOST_ROWS = 1_000;
const MOST_QUESTIONS = 1_000;

export const readingOfRevision = query({
  name: 'revisions.reading',
  http: 'GET /revisions/{revisionId}/reading',
  summary:
    'The table as read: columns with their roles and reasons, each row beside what was understood, rows that are no parts, open questions.',
  roles: 'everyone',
  input: z.strictObject({
    revisionId: id(),
    sheet: z.string().max(200).optional(),
    from: z.coerce.number().int().min(1).default(1),
    size: z.coerce.number().int().min(1).max(MOST_ROWS).default(MOST_ROWS),
  }),
  output: z.object({
    revisionId: id(),
    version: z.number().int(),
    state: z.enum(['draft', 'frozen']),
    fileName: z.string().nullable(),
    format: z.string(),
    sheets: z.array(z.string()),
    tables: z.array(
      z.object({
        sheet: z.string().nullable(),
        columns: z.array(columnReading),
        rows: z.array(readRow),
        rowCount: z.number().int(),
        rowsKept: z.number().int(),
      }),
    ),
    notLines: z.array(notLine),
    questions: z.array(questionFields),
  }),
  async run({ tx, actor, input }) {
    const { workshopId } = actor;
    const [row] = await tx
      .select({
        version: revision.version,
        state: revision.state,
        reading: revision.reading,
        fileName: upload.fileName,
      })
      .from(revision)
      .leftJoin(upload, and(eq(upload.workshopId, revision.workshopId), eq(upload.id, revision.uploadId)))
      .where(and(eq(revision.workshopId, workshopId), eq(revision.id, input.revisionId)));
    if (!row) throw notFound('revision');
    const kept = keptReading.parse(row.reading);
    const questions = await listQuestions(tx, workshopId, input.revisionId, MOST_QUESTIONS);
    const shown = kept.tables
      .filter((table) => input.sheet === undefined || table.sheet === input.sheet)
      .map((table) => ({
        ...table,
        rowsKept: table.rows.length,
        rows: table.rows.slice(input.from - 1, input.from - 1 + input.size),
      }));
    const rowNumbers = shown.flatMap((table) => table.rows.map((one) => one.row));
    const lines = await tx.execute<{
      place_sheet: string | null;
      place_row: number;
      line: z.input<typeof understood>;
    }>(sql`
      select l.sheet as place_sheet, l.source_row as place_row,
             json_build_object('id', l.id, 'designators', l.designators, 'quantity', l.quantity, 'fitted', l.fitted, 'kind', l.kind, 'text', l.text, 'use', l.use, 'spec', l.spec) as line
        from line l where l.workshop_id = ${workshopId} and l.revision_id = ${input.revisionId}
         and l.source_row between ${Math.min(...rowNumbers, 2 ** 31 - 1)} and ${Math.max(...rowNumbers, 0)}
       order by l.position`);
    const linesByPlace = new Map<string, z.input<typeof understood>[]>();
    for (const { place_sheet: sheet, place_row: at, line } of lines.rows) {
      const place = placeOf(sheet, at);
      linesByPlace.set(place, [...(linesByPlace.get(place) ?? []), line]);
    }
    const whyByPlace = new Map(kept.notLines.map((one) => [placeOf(one.sheet, one.row), one.why]));
    const askedByPlace = new Map<string, string[]>();
    for (const question of questions) {
      const place = placeOf(question.sheet, question.row);
      askedByPlace.set(place, [...(askedByPlace.get(place) ?? []), question.id]);
    }
    const tables = shown.map((table) => ({
      ...table,
      rows: table.rows.map(({ row: at, cells }) => {
        const place = placeOf(table.sheet, at);
        return {
          row: at,
          cells,
          lines: linesByPlace.get(place) ?? [],
          notLine: whyByPlace.get(place) ?? null,
          questionIds: askedByPlace.get(place) ?? [],
        };
      }),
    }));
    return {
      revisionId: input.revisionId,
      version: row.version,
      state: row.state === 'frozen' ? ('frozen' as const) : ('draft' as const),
      fileName: row.fileName,
      format: kept.format,
      sheets: kept.sheets,
      tables,
      notLines: kept.notLines,
      questions,
    };
  },
});

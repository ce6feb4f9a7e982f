/** Writes the lines and questions of a reading, a few thousand rows a statement, so that memory stays bounded. */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { type LineDraft, lineRowOf, type QuestionDraft } from './line-draft';

const ROWS_AT_ONCE = 2_000;

export interface StoredLines {
  /** By placeOf(); the first line of a row that gave several. */
  readonly idByPlace: ReadonlyMap<string, string>;
}

export const placeOf = (sheet: string | null, row: number): string => `${row}\u0000${sheet ?? ''}`;

/** @param progress called after each statement with how many lines are in */
export async function storeLines(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  drafts: readonly LineDraft[],
  progress?: (done: number) => Promise<void>,
): Promise<StoredLines> {
  const idByPlace = new Map<string, string>();
  for (let from = 0; from < drafts.length; from += ROWS_AT_ONCE) {
    const rows = drafts.slice(from, from + ROWS_AT_ONCE).map((draft, place) => {
      const id = newId();
      const where = placeOf(draft.sheet, draft.sourceRow);
      if (!idByPlace.has(where)) idByPlace.set(where, id);
      return lineRowOf(draft, id, from + place + 1);
    });
    await insertLines(tx, workshopId, revisionId, rows);
    await progress?.(Math.min(from + ROWS_AT_ONCE, drafts.length));
  }
  return { idByPlace };
}

export async function insertLines(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  rows: readonly ReturnType<typeof lineRowOf>[],
): Promise<void> {
  await tx.execute(sql`
    insert into line (workshop_id, id, revision_id, position, sheet, source_row, designators, quantity, fitted, kind, text, spec, part_number, family, value, unit, use, spec_key)
    select ${workshopId}::uuid, r.id, ${revisionId}::uuid, r.position, r.sheet, r.source_row, r.designators, r.quantity, r.fitted, r.kind, r.text, r.spec, r.part_number, r.family, r.value, r.unit, r.use, r.spec_key
      from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb)
        as r(id uuid, position int, sheet text, source_row int, designators text[], quantity int, fitted boolean, kind text, text text, spec jsonb, part_number text, family text, value numeric, unit text, use text, spec_key text)`);
}

export async function storeQuestions(
  tx: Tx,
  workshopId: string,
  revisionId: string,
  drafts: readonly QuestionDraft[],
  lines: StoredLines,
): Promise<void> {
  for (let from = 0; from < drafts.length; from += ROWS_AT_ONCE) {
    const rows = drafts.slice(from, from + ROWS_AT_ONCE).map((draft) => ({
      id: newId(),
      line_id: lines.idByPlace.get(placeOf(draft.sheet, draft.sourceRow)) ?? null,
      sheet: draft.sheet,
      source_row: draft.sourceRow,
      code: draft.code,
      ask: draft.ask,
      options: draft.options,
    }));
    await tx.execute(sql`
      insert into question (workshop_id, id, revision_id, line_id, sheet, source_row, code, ask, options)
      select ${workshopId}::uuid, q.id, ${revisionId}::uuid, q.line_id, q.sheet, q.source_row, q.code, q.ask, q.options
        from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as q(id uuid, line_id uuid, sheet text, source_row int, code text, ask text, options text[])`);
  }
}

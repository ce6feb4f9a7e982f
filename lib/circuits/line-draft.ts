/** A line before it has a row in the database: what was read, counted and understood. Pure. */
import type { PartSpec } from '@/lib/electronics/part-spec';
import type { Use } from '@/lib/electronics/stand-in/check';
import { lineFactsOf } from './part-spec-schema';

export interface LineDraft {
  readonly sheet: string | null;
  readonly sourceRow: number;
  readonly designators: readonly string[];
  /** Units one circuit needs. */
  readonly quantity: number;
  readonly spec: PartSpec;
  readonly use: Use | null;
}

export interface QuestionDraft {
  readonly sheet: string | null;
  readonly sourceRow: number;
  readonly code: string;
  readonly ask: string;
  readonly options: readonly string[];
}

export const MOST_DESIGNATORS = 2_000;
export const MOST_QUANTITY = 1_000_000;

/** The row as the database has it. */
export function lineRowOf(draft: LineDraft, id: string, position: number) {
  return {
    id,
    position,
    sheet: draft.sheet,
    source_row: draft.sourceRow,
    designators: draft.designators,
    quantity: draft.quantity,
    fitted: draft.spec.fitted,
    use: draft.use,
    ...factsInSql(draft.spec),
  };
}

export function factsInSql(spec: PartSpec) {
  const { kind, text, partNumber, family, value, unit, specKey } = lineFactsOf(spec);
  return { kind, text, spec, part_number: partNumber, family, value, unit, spec_key: specKey };
}

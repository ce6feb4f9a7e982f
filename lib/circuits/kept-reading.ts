/** What a revision keeps of its reading beside the lines: the table as it stood, what each column was taken for and why. */
import { z } from 'zod';

export const columnReading = z.object({
  /** 0-based place in the table. */
  index: z.number().int(),
  heading: z.string(),
  role: z.string(),
  /** Why it was taken for that, in a builder's words. */
  because: z.string(),
});

export const tableRow = z.object({ row: z.number().int(), cells: z.array(z.string()) });

export const tableReading = z.object({
  sheet: z.string().nullable(),
  columns: z.array(columnReading),
  /** The first rows only of a long table; rowCount says how many there are. */
  rows: z.array(tableRow),
  rowCount: z.number().int(),
});

export const notLine = z.object({
  row: z.number().int(),
  sheet: z.string().nullable(),
  why: z.string(),
  text: z.string(),
});

export const columnCorrection = z.object({ sheet: z.string().nullable(), index: z.number().int(), role: z.string() });

export const keptReading = z.object({
  format: z.string().default(''),
  sheets: z.array(z.string()).default([]),
  tables: z.array(tableReading).default([]),
  /** At most MOST_KEPT_ROWS of them; notLineCount is the whole. */
  notLines: z.array(notLine).default([]),
  notLineCount: z.number().int().default(0),
  /** Roles that a person set; they hold when the original is read again. */
  columnRoles: z.array(columnCorrection).default([]),
});
export type KeptReading = z.output<typeof keptReading>;
export type ColumnCorrection = z.output<typeof columnCorrection>;

/** Longer tables are not kept beside the lines: the original is, and the lines hold their own text. */
export const MOST_KEPT_ROWS = 5_000;
export const MOST_KEPT_CELL_CHARACTERS = 500;

/** What every format is brought to before anything is understood: rows of texts with their places in the file. */

export interface TableRow {
  /** 1-based physical line of a text file (headings and empty lines count), or 1-based row of the sheet. */
  readonly row: number;
  readonly cells: readonly string[];
}

export interface Table {
  /** Null where the file has only one. */
  readonly sheet: string | null;
  readonly rows: readonly TableRow[];
}

export interface PartsListProblem {
  readonly ok: false;
  readonly code:
    | 'empty'
    | 'not-a-list'
    | 'protected'
    | 'damaged'
    | 'too-many-rows'
    | 'cell-too-long'
    | 'too-many-columns'
    | 'bad-quantity'
    | 'no-parts'
    | 'expands-too-far'
    | 'too-many-sheets'
    | 'cancelled';
  readonly detail: string;
  /** 1-based. */
  readonly row?: number;
  /** Spreadsheet letter: A, B, …, AA. */
  readonly column?: string;
  readonly sheet?: string;
  readonly cure: string;
}

export const LIMITS = {
  rows: 200_000,
  columns: 200,
  cellCharacters: 32_767,
  sheets: 30,
  expandedBytes: 600 * 1024 * 1024,
  expansionRatio: 200,
  zipEntries: 2_000,
} as const;

/** 0 → A, 25 → Z, 26 → AA. */
export function columnLetters(index: number): string {
  let rest = index;
  let letters = '';
  do {
    letters = String.fromCharCode(65 + (rest % 26)) + letters;
    rest = Math.floor(rest / 26) - 1;
  } while (rest >= 0);
  return letters;
}

/** Carries a problem out of deep reading; never leaves lib/parts-list. */
export class ReadingStopped extends Error {
  readonly problem: PartsListProblem;
  constructor(problem: Omit<PartsListProblem, 'ok'>) {
    super(problem.detail);
    this.problem = { ok: false, ...problem };
  }
}

/** Row and cell limits, checked while rows are made, so that a huge file stops early. */
export function checkRow(row: TableRow, sheet: string | null, count: number): void {
  const place = { row: row.row, ...(sheet === null ? {} : { sheet }) };
  if (count > LIMITS.rows) {
    throw new ReadingStopped({
      code: 'too-many-rows',
      detail: `The list has more than ${LIMITS.rows.toLocaleString('en')} rows.`,
      ...place,
      cure: 'Split it, or remove what is no part.',
    });
  }
  row.cells.forEach((cell, index) => {
    if (cell.length > LIMITS.cellCharacters) {
      throw new ReadingStopped({
        code: 'cell-too-long',
        detail: `The cell in row ${row.row}, column ${columnLetters(index)} holds ${cell.length.toLocaleString('en')} characters; a spreadsheet cell holds at most ${LIMITS.cellCharacters.toLocaleString('en')}.`,
        ...place,
        column: columnLetters(index),
        cure: 'Shorten that cell, or close the quotation mark that was left open there.',
      });
    }
  });
  if (row.cells.length > LIMITS.columns && row.cells.slice(LIMITS.columns).some((cell) => cell !== '')) {
    throw new ReadingStopped({
      code: 'too-many-columns',
      detail: `Row ${row.row} has ${row.cells.length.toLocaleString('en')} columns; a parts list has at most ${LIMITS.columns}.`,
      ...place,
      column: columnLetters(LIMITS.columns),
      cure: 'Keep only the columns of the list.',
    });
  }
}

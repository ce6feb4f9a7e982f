/** Cells that say how many, and whether at all. */
import { NOT_FITTED } from '@/lib/electronics/part-words';
import type { Column } from './columns';
import { ReadingStopped, type TableRow } from './table';

/**
 * Whole and positive, or null where the cell says no number.
 * @throws ReadingStopped with its place for a fraction or a negative number
 */
export function quantityIn(text: string, place: { row: number; sheet?: string }, column: string): number | null {
  const cell = text.normalize('NFKC').trim();
  const stop = (what: string) =>
    new ReadingStopped({
      code: 'bad-quantity',
      detail: `The quantity “${text.slice(0, 40)}” in row ${place.row}, column ${column} is ${what}.`,
      ...place,
      column,
      cure: 'Write a whole number of parts, or leave the cell empty.',
    });
  if (/^[-−]\s*\d/.test(cell)) throw stop('negative');
  const number = /^(?:[x×]\s*)?(\d{1,7})(?:[.,](\d+))?\s*(?:[x×]|pcs?\.?|st(?:k|ück)?\.?|pieces?)?(?=$|\s|\()/i.exec(
    cell,
  );
  if (!number) return null;
  if (number[2] !== undefined && !/^0+$/.test(number[2])) throw stop('a fraction');
  return Number(number[1]);
}

/** False where a cell of the row says that the part is left out. */
export function isFitted(columns: readonly Column[], row: TableRow, remarks: readonly string[]): boolean {
  for (const column of columns) {
    if (column.role !== 'fitted') continue;
    const cell = (row.cells[column.index] ?? '').trim();
    if (cell === '') continue;
    const meansNot = /^(?:dnp|dnf|dni|do not|not|no pop|omit|excluded)/i.test(cell);
    const yes = /^(?:1|x|yes|y|true|ja|oui|sí|si|wahr)$/i.test(cell);
    const headingSaysNot = /dn[pfi]|not/i.test(column.heading);
    if (meansNot || (yes && headingSaysNot) || (!headingSaysNot && /^(?:0|no|n|false|nein|non)$/i.test(cell)))
      return false;
  }
  return !remarks.some((cell) => NOT_FITTED.test(cell));
}

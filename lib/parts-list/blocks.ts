/** Tables that stand side by side on one sheet, with empty columns between them: each is read by itself. */
import type { TableRow } from './table';

/** Fewer are a list's own empty columns. */
const FEWEST_EMPTY_COLUMNS = 3;

/**
 * The same rows once for each block, with the other blocks' cells emptied, so that rows and columns keep their places in
 * the file. One block where nothing parts the sheet.
 */
export function blocksOf(rows: readonly TableRow[]): readonly (readonly TableRow[])[] {
  const spans = spansOf(rows);
  if (spans.length < 2) return [rows];
  return spans.map(({ from, to }) =>
    rows
      .map(({ row, cells }) => ({ row, cells: cells.map((cell, index) => (index >= from && index <= to ? cell : '')) }))
      .filter(({ cells }) => cells.some((cell) => cell !== '')),
  );
}

function spansOf(rows: readonly TableRow[]): { from: number; to: number }[] {
  const used = new Set<number>();
  for (const { cells } of rows) cells.forEach((cell, index) => cell !== '' && used.add(index));
  const spans: { from: number; to: number }[] = [];
  for (const index of [...used].sort((a, b) => a - b)) {
    const last = spans.at(-1);
    if (last && index - last.to <= FEWEST_EMPTY_COLUMNS) last.to = index;
    else spans.push({ from: index, to: index });
  }
  return spans;
}

/**
 * Bins in bulk by a pattern: `A-{01..12}-{1..6}` is 72 bins, twelve columns of six. The first range is the column, the
 * second the row; a number's width in the range is the width in the code. Pure.
 */

export interface PlannedBin {
  readonly code: string;
  /** 1 is the leftmost. */
  readonly column: number;
  /** 1 is the top. */
  readonly row: number;
}

/** At most this many bins at once: 60 columns of 60 rows, the largest cabinet. */
export const MOST_BINS_OF_A_PATTERN = 3_600;

export type BinPattern =
  | { readonly ok: true; readonly bins: readonly PlannedBin[] }
  | { readonly ok: false; readonly why: string };

const RANGE = /\{(\d{1,4})(?:\.\.(\d{1,4}))?\}/g;

/** Column by column, each from the top. A pattern with one range is one row. */
export function expandBinPattern(pattern: string): BinPattern {
  const text = pattern.trim();
  const ranges = [...text.matchAll(RANGE)].map((match) => ({ from: match[1] ?? '', to: match[2] ?? match[1] ?? '' }));
  const around = text.split(RANGE_SPLIT);
  if (ranges.length < 1 || ranges.length > 2) {
    return { ok: false, why: 'needs one or two ranges in braces, such as A-{01..12}-{1..6}' };
  }
  if (around.some((part) => !/^[A-Z0-9-]*$/.test(part))) {
    return { ok: false, why: 'has something other than capitals, digits and hyphens outside its braces' };
  }
  const backwards = ranges.find((range) => Number(range.to) < Number(range.from) || Number(range.from) < 1);
  if (backwards)
    return { ok: false, why: `counts from ${backwards.from} to ${backwards.to}; ranges start at 1 and go up` };
  const [columns, rows] = [numbersOf(ranges[0]), ranges[1] ? numbersOf(ranges[1]) : [{ number: 1, text: null }]];
  if (columns.length * rows.length > MOST_BINS_OF_A_PATTERN) {
    return { ok: false, why: `makes ${columns.length * rows.length} bins; at most ${MOST_BINS_OF_A_PATTERN} at once` };
  }
  const [before = '', between = '', after = ''] = around;
  const bins = columns.flatMap((column) =>
    rows.map((row) => ({
      code:
        row.text === null
          ? `${before}${column.text}${between}`
          : `${before}${column.text}${between}${row.text}${after}`,
      column: column.number,
      row: row.number,
    })),
  );
  const tooLong = bins.find((bin) => bin.code.length > 20);
  return tooLong
    ? { ok: false, why: `makes codes longer than 20 characters, such as ${tooLong.code}` }
    : { ok: true, bins };
}

/** Without groups, so that split() gives only the text between. */
const RANGE_SPLIT = /\{\d{1,4}(?:\.\.\d{1,4})?\}/;

function numbersOf(range: { from: string; to: string } | undefined): { number: number; text: string }[] {
  if (!range) return [];
  const [from, to] = [Number(range.from), Number(range.to)];
  return Array.from({ length: to - from + 1 }, (_, index) => ({
    number: from + index,
    text: String(from + index).padStart(range.from.length, '0'),
  }));
}

/** Text to rows: separated by commas, semicolons, tabs or bars, in fixed columns, or one part a line. */
import Papa from 'papaparse';
import { checkRow, type Table, type TableRow } from './table';

const DELIMITERS = ['\t', ';', ',', '|'] as const;
const SAMPLE_CHARACTERS = 24_000;

export function readDelimited(text: string): Table {
  const sample = text.slice(0, SAMPLE_CHARACTERS);
  const delimiter = chooseDelimiter(sample);
  if (delimiter === null) return { sheet: null, rows: readLines(text) };
  const { data } = Papa.parse<string[]>(text, { delimiter, skipEmptyLines: false });
  const rows: TableRow[] = [];
  let line = 1;
  for (const record of data) {
    const cells = record.map((cell) => cell.trim());
    const row = { row: line, cells };
    line += 1;
    for (const cell of record) if (cell.includes('\n')) line += cell.split('\n').length - 1;
    if (cells.every((cell) => cell === '')) continue;
    rows.push(row);
    checkRow(row, null, rows.length);
  }
  return { sheet: null, rows };
}

/** The separator that cuts most lines into the same number of pieces, at least two; null where none does. */
function chooseDelimiter(sample: string): string | null {
  let best: { delimiter: string; score: number } | null = null;
  for (const delimiter of DELIMITERS) {
    const { data } = Papa.parse<string[]>(sample, { delimiter, preview: 80, skipEmptyLines: true });
    const counts = data.map((record) => record.length);
    const cut = counts.filter((count) => count > 1);
    if (cut.length < Math.max(1, counts.length * 0.35)) continue;
    const often = new Map<number, number>();
    for (const count of cut) often.set(count, (often.get(count) ?? 0) + 1);
    const [usual, times] = [...often].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0] ?? [0, 0];
    const score =
      (times / counts.length) * (1 + Math.min(usual, 12) / 12) +
      (delimiter === '\t' ? 0.2 : 0) -
      (delimiter === ',' && usual === 2 ? 0.3 : 0);
    if (!best || score > best.score) best = { delimiter, score };
  }
  return best?.delimiter ?? null;
}

const KEYED =
  /^(?:[-*•+]\s+)?(?:\[[ xX✓]?\]\s*)?([A-Za-z]{1,5}\$?\d{1,5}(?:\s*(?:[-–,/&]|\.\.)\s*[A-Za-z]{0,5}\d{1,5})*)\s*(?:[:=\t]|\s[-–]\s|\s)\s*(\S.*)$/;
const COUNTED = /^(?:[-*•+]\s+)?(?:\[[ xX✓]?\]\s*)?(\d{1,4})\s*[x×]\s+(\S.*)$/i;

/** Fixed columns under a heading, or lines such as `R1: 120k`, `- [x] R1 10k`, `4 x 100k`. */
function readLines(text: string): TableRow[] {
  const lines = text.split(/\r\n|\n|\r/);
  const starts = fixedColumns(lines);
  const rows: TableRow[] = [];
  lines.forEach((line, index) => {
    if (line.trim() === '') return;
    const row = {
      row: index + 1,
      cells: starts === null || line.length <= (starts[1] ?? 0) ? keyedCells(line) : cutAt(line, starts),
    };
    rows.push(row);
    checkRow(row, null, rows.length);
  });
  return rows;
}

function keyedCells(line: string): string[] {
  const keyed = KEYED.exec(line.trim());
  if (keyed) return [keyed[1] ?? '', keyed[2] ?? ''];
  const counted = COUNTED.exec(line.trim());
  return counted ? [counted[1] ?? '', counted[2] ?? ''] : [line.trim()];
}

/** Where columns begin: the heading of at least three words set apart by two blanks or more that most lines keep clear. */
function fixedColumns(lines: readonly string[]): number[] | null {
  for (const line of lines.slice(0, 40)) {
    const starts = [...line.matchAll(/(?:^|\s{2,})(\S)/g)].map((match) => match.index + match[0].length - 1);
    if (starts.length < 3) continue;
    const below = lines.filter((other) => other !== line && other.length > (starts[1] ?? 0));
    if (below.length < 2) continue;
    const kept = starts.filter(
      (start) =>
        start === 0 ||
        below.filter((other) => other[start - 1] === undefined || other[start - 1] === ' ').length >=
          below.length * 0.7,
    );
    if (kept.length >= 3) return kept;
  }
  return null;
}

const cutAt = (line: string, starts: readonly number[]): string[] =>
  starts.map((start, index) => line.slice(start, starts[index + 1]).trim());

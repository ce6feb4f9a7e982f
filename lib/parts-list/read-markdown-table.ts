/** Markdown: tables between other text, several in one file, and lists with check boxes. */
import { checkRow, type Table, type TableRow } from './table';

/** A rule under a heading (`| --- | :-: |`) is what tells Markdown from a list separated by bars. */
export function looksLikeMarkdown(text: string): boolean {
  return /^\s*\|?\s*:?-{2,}:?\s*\|/m.test(text) || /^\s*[-*]\s+\[[ xX]\]/m.test(text);
}

export function readMarkdown(text: string): Table {
  if (!/^\s*\|?\s*:?-{2,}:?\s*\|/m.test(text)) return readCheckList(text);
  const rows: TableRow[] = [];
  text.split(/\r\n|\n|\r/).forEach((line, index) => {
    const trimmed = line.trim();
    if (trimmed === '' || /^\|?[\s:|-]+\|?$/.test(trimmed)) return;
    const cells = trimmed.includes('|') ? splitCells(trimmed) : [plain(trimmed.replace(/^#+\s*/, ''))];
    const row = { row: index + 1, cells };
    rows.push(row);
    checkRow(row, null, rows.length);
  });
  return { sheet: null, rows };
}

/** A check list: one part a line, whatever commas are in it. */
function readCheckList(text: string): Table {
  const lines = text.split(/\r\n|\n|\r/);
  const rows = lines.flatMap((line, index) => {
    const trimmed = plain(line.trim());
    if (trimmed === '') return [];
    const match =
      /^(?:[-*+]\s+)?(?:\[[ xX]?\]\s*)?([A-Za-z]{1,5}\d{1,5}(?:\s*[-–,/]\s*[A-Za-z]{0,5}\d{1,5})*)\s*[:=]?\s+(\S.*)$/.exec(
        trimmed,
      );
    return [{ row: index + 1, cells: match ? [match[1] ?? '', match[2] ?? ''] : [trimmed.replace(/^#+\s*/, '')] }];
  });
  return { sheet: null, rows };
}

function splitCells(line: string): string[] {
  const inner = line.replace(/^\|/, '').replace(/\|$/, '');
  return inner.split(/(?<!\\)\|/).map((cell) => plain(cell.replaceAll('\\|', '|').trim()));
}

/** Emphasis, code marks, links and line breaks to the text they show. */
function plain(text: string): string {
  return text
    .replace(/<br\s*\/?>/gi, ' ')
    .replace(/!?\[([^\]]*)\]\([^)]*\)/g, '$1')
    .replace(/(\*\*|__|`)(.+?)\1/g, '$2')
    .trim();
}

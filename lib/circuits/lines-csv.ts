/** Lines as RFC 4180 CSV. Pure. */

export interface CsvLine {
  readonly designators: readonly string[];
  readonly quantity: number;
  readonly kind: string;
  readonly text: string;
  readonly fitted: boolean;
  readonly use: string | null;
}

const HEADING = ['Designators', 'Quantity', 'Value', 'Kind', 'Fitted', 'Use'];

export function linesCsv(lines: readonly CsvLine[]): string {
  const rows = lines.map((one) => [
    one.designators.join(' '),
    String(one.quantity),
    one.text,
    one.kind,
    one.fitted ? 'yes' : 'not fitted',
    one.use ?? '',
  ]);
  return [HEADING, ...rows].map((row) => `${row.map(cell).join(',')}\r\n`).join('');
}

/** Cells that a spreadsheet would run as a formula get an apostrophe before them (OWASP, CSV injection). */
function cell(text: string): string {
  const safe = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

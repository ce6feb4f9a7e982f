/** XLSX to rows. The archive is measured before anything is unpacked, so that a small file can't become a huge one. */
import ExcelJS from 'exceljs';
import { checkRow, LIMITS, ReadingStopped, type Table, type TableRow } from './table';

export async function readWorkbook(bytes: Uint8Array): Promise<Table[]> {
  measureArchive(bytes);
  const workbook = new ExcelJS.Workbook();
  try {
    // exceljs's types want its own Buffer; it reads any bytes.
    await workbook.xlsx.load(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer);
  } catch {
    throw damaged();
  }
  const sheets = workbook.worksheets.filter((sheet) => sheet.state !== 'veryHidden');
  if (sheets.length === 0) throw damaged();
  if (sheets.length > LIMITS.sheets)
    throw new ReadingStopped({
      code: 'too-many-sheets',
      detail: `The workbook has ${sheets.length} sheets; at most ${LIMITS.sheets} are read.`,
      row: 1,
      column: 'A',
      cure: 'Keep the sheets with the parts list.',
    });
  const tables = sheets
    .map((sheet) => ({ sheet: sheet.name, rows: rowsOf(sheet) }))
    .filter((table) => table.rows.length > 0);
  return tables.length === 1 ? tables.map((table) => ({ ...table, sheet: null })) : tables;
}

function damaged(): ReadingStopped {
  return new ReadingStopped({
    code: 'damaged',
    detail: 'The workbook is damaged, or is no workbook.',
    row: 1,
    column: 'A',
    cure: 'Open it in your spreadsheet program, save it anew as .xlsx, and read that.',
  });
}

function rowsOf(sheet: ExcelJS.Worksheet): TableRow[] {
  const rows: TableRow[] = [];
  sheet.eachRow({ includeEmpty: false }, (line, number) => {
    const cells: string[] = [];
    line.eachCell({ includeEmpty: false }, (cell, column) => {
      // A merged cell repeats its value in each; only the first holds it.
      if (cell.isMerged && cell.master !== cell) return;
      const text = cellText(cell.value).trim();
      if (text === '') return;
      while (cells.length < column - 1) cells.push('');
      cells[column - 1] = text;
    });
    if (cells.length === 0) return;
    const row = { row: number, cells };
    rows.push(row);
    checkRow(row, sheet.name, rows.length);
  });
  return rows;
}

function cellText(value: ExcelJS.CellValue): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'string') return value;
  if (typeof value === 'number') return numberText(value);
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  // What a spreadsheet turned into a date is told by its day; a person must say what stood there.
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if ('richText' in value) return value.richText.map((piece) => piece.text).join('');
  if ('hyperlink' in value)
    return typeof value.text === 'string' ? value.text : cellText(value.text as ExcelJS.CellValue);
  if ('result' in value) return value.result === undefined ? '' : cellText(value.result as ExcelJS.CellValue);
  if ('formula' in value || 'sharedFormula' in value) return '';
  if ('error' in value) return '';
  return '';
}

/** Seventeen digits of a double are noise; fifteen are what was typed. */
const numberText = (value: number): string => (Number.isFinite(value) ? String(Number(value.toPrecision(15))) : '');

const CENTRAL_ENTRY = 0x02014b50;
const END_OF_DIRECTORY = 0x06054b50;

/** Reads the archive's own directory (APPNOTE 4.3): how many entries, how large unpacked. */
function measureArchive(bytes: Uint8Array): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const end = findEnd(view);
  if (end === null) throw damaged();
  const entries = view.getUint16(end + 10, true);
  let at = view.getUint32(end + 16, true);
  let expanded = 0;
  let isWorkbook = false;
  if (entries > LIMITS.zipEntries) throw expandsTooFar();
  for (let entry = 0; entry < entries; entry += 1) {
    if (at + 46 > view.byteLength || view.getUint32(at, true) !== CENTRAL_ENTRY) throw damaged();
    const size = view.getUint32(at + 24, true);
    const nameLength = view.getUint16(at + 28, true);
    const name = new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + nameLength));
    if (name.startsWith('xl/')) isWorkbook = true;
    if ((view.getUint16(at + 8, true) & 1) === 1)
      throw new ReadingStopped({
        code: 'protected',
        detail: 'The workbook is protected by a password.',
        row: 1,
        column: 'A',
        cure: 'Save it without a password and read it again.',
      });
    expanded += size;
    at += 46 + nameLength + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  if (expanded > LIMITS.expandedBytes || expanded > 10_000_000 + bytes.length * LIMITS.expansionRatio)
    throw expandsTooFar();
  if (!isWorkbook)
    throw new ReadingStopped({
      code: 'not-a-list',
      detail: 'This is an archive, but no workbook.',
      row: 1,
      column: 'A',
      cure: 'Unpack it and choose the list in it.',
    });
}

function expandsTooFar(): ReadingStopped {
  return new ReadingStopped({
    code: 'expands-too-far',
    detail: 'Unpacked, this workbook would be far larger than a parts list can be.',
    row: 1,
    column: 'A',
    cure: 'Copy the list into a new workbook and read that.',
  });
}

function findEnd(view: DataView): number | null {
  for (let at = view.byteLength - 22; at >= Math.max(0, view.byteLength - 65_557); at -= 1)
    if (view.getUint32(at, true) === END_OF_DIRECTORY) return at;
  return null;
}

/**
 * An order on paper: a PDF on the workshop's letterhead, and the same lines as CSV for the supplier's own system.
 * Cells that a spreadsheet would run as a formula are neutralised (OWASP CSV Injection).
 */
import 'server-only';
import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import path from 'node:path';
import Papa from 'papaparse';
import PDFDocument from 'pdfkit';
import { minorDigits } from './order-money';

export interface OrderDocument {
  readonly number: string;
  readonly workshopName: string;
  readonly letterhead: string;
  readonly supplierName: string;
  readonly supplierAddress: string;
  readonly currency: string;
  readonly orderedOn: string;
  readonly expectedOn: string | null;
  readonly buyerName: string;
  readonly paid: boolean;
  readonly note: string;
  readonly goodsMinor: number;
  readonly postageMinor: number;
  readonly totalMinor: number;
  readonly lines: readonly {
    position: number;
    supplierCode: string;
    description: string;
    quantity: number;
    unitPrice: string;
    totalMinor: number;
  }[];
}

export function amountText(minor: number, currency: string): string {
  const digits = minorDigits(currency);
  const text = String(minor).padStart(digits + 1, '0');
  return digits === 0 ? text : `${text.slice(0, -digits)}.${text.slice(-digits)}`;
}

/** A leading =, +, -, @, tab or return makes a spreadsheet compute the cell; a quote before it makes it text. */
export const harmlessCell = (text: string): string => (/^[=+\-@\t\r]/.test(text) ? `'${text}` : text);

export function orderCsv(order: OrderDocument): string {
  return Papa.unparse(
    order.lines.map((line) => ({
      order: order.number,
      position: line.position,
      code: harmlessCell(line.supplierCode),
      description: harmlessCell(line.description),
      quantity: line.quantity,
      unit_price: line.unitPrice,
      total: amountText(line.totalMinor, order.currency),
      currency: order.currency,
    })),
    { newline: '\r\n' },
  );
}

const REGULAR = 'atkinson-hyperlegible-next-latin-400-normal.woff';
const BOLD = 'atkinson-hyperlegible-next-latin-700-normal.woff';

/** pdfkit reads static fonts only; the package that ships them is found wherever npm put it. */
async function fontFile(name: string): Promise<Buffer> {
  const require = createRequire(path.join(process.cwd(), 'package.json'));
  const folder = path.dirname(require.resolve('@fontsource/atkinson-hyperlegible-next/package.json'));
  return readFile(path.join(folder, 'files', name));
}

const MM = 72 / 25.4;
const LEFT = 20 * MM;
const RIGHT = 190 * MM;
const COLUMNS = [
  { title: 'Pos.', x: LEFT, width: 10 * MM, right: false },
  { title: 'Code', x: 32 * MM, width: 32 * MM, right: false },
  { title: 'Part', x: 66 * MM, width: 58 * MM, right: false },
  { title: 'Quantity', x: 126 * MM, width: 18 * MM, right: true },
  { title: 'Each', x: 146 * MM, width: 20 * MM, right: true },
  { title: 'Total', x: 168 * MM, width: 22 * MM, right: true },
] as const;
const FOOT = 270 * MM;

/** A4, as many pages as the lines need; each says which page of how many it is. */
export async function orderPdf(order: OrderDocument): Promise<Buffer> {
  const [regular, bold] = await Promise.all([fontFile(REGULAR), fontFile(BOLD)]);
  const pdf = new PDFDocument({
    size: 'A4',
    margin: 0,
    bufferPages: true,
    info: {
      Title: `Order ${order.number}`,
      Author: order.workshopName,
      CreationDate: new Date(`${order.orderedOn}T00:00:00Z`),
    },
  });
  const chunks: Buffer[] = [];
  const done = new Promise<Buffer>((resolve, reject) => {
    pdf.on('data', (chunk: Buffer) => chunks.push(chunk));
    pdf.on('end', () => resolve(Buffer.concat(chunks)));
    pdf.on('error', reject);
  });
  pdf.registerFont('regular', regular).registerFont('bold', bold);

  pdf
    .font('bold')
    .fontSize(15)
    .text(order.workshopName, LEFT, 18 * MM);
  pdf
    .font('regular')
    .fontSize(9)
    .text(order.letterhead, LEFT, 26 * MM, { width: 80 * MM });
  pdf
    .font('bold')
    .fontSize(11)
    .text(order.supplierName, LEFT, 52 * MM);
  pdf
    .font('regular')
    .fontSize(10)
    .text(order.supplierAddress, LEFT, 58 * MM, { width: 80 * MM });
  pdf
    .font('bold')
    .fontSize(20)
    .text(`Order ${order.number}`, 110 * MM, 50 * MM, { width: 80 * MM, align: 'right' });
  const facts = [
    `ordered ${order.orderedOn}`,
    order.expectedOn === null ? null : `expected ${order.expectedOn}`,
    `by ${order.buyerName}`,
    order.paid ? 'paid by card' : 'on account',
  ].filter((fact) => fact !== null);
  pdf
    .font('regular')
    .fontSize(10)
    .text(facts.join('\n'), 110 * MM, 60 * MM, { width: 80 * MM, align: 'right' });

  let y = tableHead(pdf, 92 * MM);
  for (const line of order.lines) {
    const cells = [
      String(line.position),
      line.supplierCode,
      line.description,
      String(line.quantity),
      line.unitPrice,
      amountText(line.totalMinor, order.currency),
    ];
    pdf.font('regular').fontSize(9.5);
    const height =
      Math.max(...COLUMNS.map((column, index) => pdf.heightOfString(cells[index] ?? '', { width: column.width }))) +
      2.4 * MM;
    if (y + height > FOOT) {
      pdf.addPage();
      y = tableHead(pdf, 20 * MM);
    }
    COLUMNS.forEach((column, index) =>
      pdf
        .font('regular')
        .fontSize(9.5)
        .text(cells[index] ?? '', column.x, y, { width: column.width, align: column.right ? 'right' : 'left' }),
    );
    y += height;
    pdf
      .moveTo(LEFT, y - 1.2 * MM)
      .lineTo(RIGHT, y - 1.2 * MM)
      .lineWidth(0.3)
      .strokeColor('#d9cfbd')
      .stroke();
  }
  if (y + 30 * MM > FOOT) {
    pdf.addPage();
    y = 20 * MM;
  }
  for (const [label, minor, font] of [
    ['Goods', order.goodsMinor, 'regular'],
    ['Postage', order.postageMinor, 'regular'],
    [`Total ${order.currency}`, order.totalMinor, 'bold'],
  ] as const) {
    pdf
      .font(font)
      .fontSize(10)
      .text(label, 120 * MM, y + 2 * MM, { width: 40 * MM, align: 'right' });
    pdf
      .font(font)
      .fontSize(10)
      .text(amountText(minor, order.currency), 168 * MM, y + 2 * MM, { width: 22 * MM, align: 'right' });
    y += 6 * MM;
  }
  if (order.note)
    pdf
      .font('regular')
      .fontSize(10)
      .text(order.note, LEFT, y + 6 * MM, { width: 120 * MM });

  const { count } = pdf.bufferedPageRange();
  for (let page = 0; page < count; page += 1) {
    pdf.switchToPage(page);
    pdf
      .font('regular')
      .fontSize(8)
      .fillColor('#5d5a53')
      .text(`Order ${order.number}, page ${page + 1} of ${count}`, LEFT, 285 * MM, {
        width: RIGHT - LEFT,
        align: 'center',
        lineBreak: false,
      });
    pdf.fillColor('#1f2328');
  }
  pdf.end();
  return done;
}

function tableHead(pdf: PDFKit.PDFDocument, y: number): number {
  pdf.fillColor('#1f2328');
  for (const column of COLUMNS)
    pdf
      .font('bold')
      .fontSize(9)
      .text(column.title, column.x, y, { width: column.width, align: column.right ? 'right' : 'left' });
  pdf
    .moveTo(LEFT, y + 5 * MM)
    .lineTo(RIGHT, y + 5 * MM)
    .lineWidth(0.8)
    .strokeColor('#1f2328')
    .stroke();
  return y + 7 * MM;
}

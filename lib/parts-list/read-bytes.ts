/** What a file is, by its content and never by its name, and its text in whatever encoding a spreadsheet left it. */
import { ReadingStopped } from './table';

export type FileKind = 'workbook' | 'text';

const startsWith = (bytes: Uint8Array, signature: readonly number[]): boolean =>
  signature.every((byte, index) => bytes[index] === byte);
const PICTURES: readonly (readonly [string, readonly number[]])[] = [
  ['a PNG picture', [0x89, 0x50, 0x4e, 0x47]],
  ['a JPEG picture', [0xff, 0xd8, 0xff]],
  ['a GIF picture', [0x47, 0x49, 0x46, 0x38]],
  ['a TIFF picture', [0x49, 0x49, 0x2a, 0x00]],
  ['a PDF', [0x25, 0x50, 0x44, 0x46, 0x2d]],
  ['a gzip archive', [0x1f, 0x8b]],
  ['a program', [0x7f, 0x45, 0x4c, 0x46]],
  ['a RAR archive', [0x52, 0x61, 0x72, 0x21]],
  ['a 7z archive', [0x37, 0x7a, 0xbc, 0xaf]],
];
const ZIP = [0x50, 0x4b, 0x03, 0x04];
/** The container of old .xls workbooks, and of password-protected .xlsx ones (MS-OFFCRYPTO). */
const COMPOUND_FILE = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];

/** Throws ReadingStopped for what is neither text nor a workbook. */
export function sniff(bytes: Uint8Array): FileKind {
  if (bytes.length === 0)
    throw new ReadingStopped({
      code: 'empty',
      detail: 'The file is empty.',
      row: 1,
      column: 'A',
      cure: 'Save the list again and choose that file.',
    });
  if (startsWith(bytes, ZIP)) return 'workbook';
  if (startsWith(bytes, COMPOUND_FILE)) {
    const isProtected = containsUtf16(bytes, 'EncryptedPackage');
    throw new ReadingStopped(
      isProtected
        ? {
            code: 'protected',
            detail: 'The workbook is protected by a password.',
            row: 1,
            column: 'A',
            cure: 'Save it without a password and read it again.',
          }
        : {
            code: 'not-a-list',
            detail: 'This is a workbook of the old .xls kind.',
            row: 1,
            column: 'A',
            cure: 'Save it as .xlsx or .csv and read it again.',
          },
    );
  }
  for (const [what, signature] of PICTURES) {
    if (startsWith(bytes, signature))
      throw new ReadingStopped({
        code: 'not-a-list',
        detail: `This is ${what}, whatever its name says.`,
        row: 1,
        column: 'A',
        cure: 'Choose the spreadsheet, a CSV, or paste the table.',
      });
  }
  return 'text';
}

function containsUtf16(bytes: Uint8Array, word: string): boolean {
  const pattern = Buffer.from(word, 'utf16le');
  return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength).includes(pattern);
}

/** Bytes to text: byte-order marks, UTF-8, UTF-16 without a mark, Windows-1252, Mac Roman. Throws ReadingStopped for binary. */
export function decodeText(bytes: Uint8Array): string {
  const text = decode(bytes);
  // A stray NUL or two is a spreadsheet's slip; many are a binary file.
  const nuls = countNuls(text);
  if (nuls > 8 && nuls > text.length / 200)
    throw new ReadingStopped({
      code: 'not-a-list',
      detail: 'This is no text: it is full of zero bytes.',
      row: 1,
      column: 'A',
      cure: 'Choose the spreadsheet, a CSV, or paste the table.',
    });
  return text.replaceAll('\u0000', '').replace(/^\ufeff/, '');
}

function countNuls(text: string): number {
  let count = 0;
  for (let index = text.indexOf('\u0000'); index >= 0; index = text.indexOf('\u0000', index + 1)) count += 1;
  return count;
}

function decode(bytes: Uint8Array): string {
  if (startsWith(bytes, [0xff, 0xfe])) return new TextDecoder('utf-16le').decode(bytes);
  if (startsWith(bytes, [0xfe, 0xff])) return new TextDecoder('utf-16be').decode(bytes);
  const sample = bytes.subarray(0, 4_096);
  const zeroAt = (parity: number) => sample.filter((byte, index) => index % 2 === parity && byte === 0).length;
  if (sample.length >= 4 && zeroAt(1) > sample.length / 5) return new TextDecoder('utf-16le').decode(bytes);
  if (sample.length >= 4 && zeroAt(0) > sample.length / 5) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    // Mac Roman has µ at B5 and Ω at BD as Windows-1252 has µ and ½: what tells them is the umlauts and the degree sign.
    return looksMacRoman(bytes)
      ? new TextDecoder('macintosh').decode(bytes)
      : new TextDecoder('windows-1252').decode(bytes);
  }
}

/** Letters of words sit at 80–9F in Mac Roman and at C0–FF in Windows-1252, where 80–9F are quotes and dashes. */
function looksMacRoman(bytes: Uint8Array): boolean {
  let mac = 0;
  let windows = 0;
  for (let index = 0; index < Math.min(bytes.length, 200_000); index += 1) {
    const byte = bytes[index] ?? 0;
    if (byte >= 0x80 && byte <= 0x9f && ![0x80, 0x85, 0x91, 0x92, 0x93, 0x94, 0x95, 0x96, 0x97, 0x99].includes(byte))
      mac += 1;
    if (byte >= 0xc0) windows += 1;
  }
  return mac > windows;
}

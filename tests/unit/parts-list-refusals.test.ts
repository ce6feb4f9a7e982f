/** What can't be read at all is refused with its place and a cure; nothing throws, nothing hangs. */
import ExcelJS from 'exceljs';
import { describe, expect, it } from 'vitest';
import { readPartsList } from '@/lib/parts-list/read-parts-list';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
const HEADING = 'Designator,Qty,Value\n';

async function workbook(): Promise<Uint8Array> {
  const book = new ExcelJS.Workbook();
  const sheet = book.addWorksheet('List');
  sheet.addRow(['Designator', 'Qty', 'Value']);
  sheet.addRow(['R1', 1, '4k7']);
  return new Uint8Array(await book.xlsx.writeBuffer());
}

/** An archive's own marks: local header, then the directory entry, then its end (APPNOTE 4.3). */
function archiveClaiming(expandedBytes: number): Uint8Array {
  const name = Buffer.from('xl/workbook.xml');
  const local = Buffer.alloc(30 + name.length);
  local.writeUInt32LE(0x04034b50, 0);
  local.writeUInt16LE(name.length, 26);
  name.copy(local, 30);
  const entry = Buffer.alloc(46 + name.length);
  entry.writeUInt32LE(0x02014b50, 0);
  entry.writeUInt32LE(expandedBytes, 24);
  entry.writeUInt16LE(name.length, 28);
  name.copy(entry, 46);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(1, 10);
  end.writeUInt32LE(entry.length, 12);
  end.writeUInt32LE(local.length, 16);
  return new Uint8Array(Buffer.concat([local, entry, end]));
}

/** The compound file (MS-CFB) that an encrypted workbook is wrapped in (MS-OFFCRYPTO): its mark and its stream's name. */
const protectedWorkbook = (): Uint8Array =>
  new Uint8Array(
    Buffer.concat([
      Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]),
      Buffer.alloc(504),
      Buffer.from('EncryptedPackage', 'utf16le'),
    ]),
  );

const PNG = new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13]);

const REFUSED: Readonly<Record<string, { make: () => Uint8Array | Promise<Uint8Array>; problem: object }>> = {
  'an empty file': { make: () => new Uint8Array(), problem: { code: 'empty', row: 1, column: 'A' } },
  'a file of blanks': { make: () => bytes(' \n\t\n '), problem: { code: 'empty', row: 1, column: 'A' } },
  'a picture named .csv': { make: () => PNG, problem: { code: 'not-a-list', row: 1, column: 'A' } },
  'a workbook under a password': { make: protectedWorkbook, problem: { code: 'protected', row: 1, column: 'A' } },
  'a workbook cut off in the middle': {
    make: async () => (await workbook()).subarray(0, 900),
    problem: { code: 'damaged', row: 1, column: 'A' },
  },
  'a workbook with a byte turned round': {
    make: async () => {
      const whole = await workbook();
      for (let at = 200; at < 900; at += 1) whole[at] = (whole[at] ?? 0) ^ 0xff;
      return whole;
    },
    problem: { code: 'damaged', row: 1, column: 'A' },
  },
  'an archive that would unpack to gigabytes': {
    make: () => archiveClaiming(4_000_000_000),
    problem: { code: 'expands-too-far', row: 1, column: 'A' },
  },
  'a list with no part in it': {
    make: () => bytes('Minutes of the meeting\nWe met on Tuesday.\n'),
    problem: { code: 'no-parts', row: 1, column: 'A' },
  },
  '200,001 rows': {
    make: () => bytes(HEADING + 'R1,1,4k7\n'.repeat(200_001)),
    problem: { code: 'too-many-rows', row: 200_001 },
  },
  'a cell of 1 MB': {
    make: () => bytes(`${HEADING}R1,1,4k7\nR2,1,${'x'.repeat(1_048_576)}\n`),
    problem: { code: 'cell-too-long', row: 3, column: 'C' },
  },
  'a negative quantity': {
    make: () => bytes(`${HEADING}R1,1,4k7\nR2,-2,1k\n`),
    problem: { code: 'bad-quantity', row: 3, column: 'B' },
  },
  'a fractional quantity': {
    make: () => bytes(`${HEADING}R1,1.5,4k7\n`),
    problem: { code: 'bad-quantity', row: 2, column: 'B' },
  },
  'a row of 300 columns': {
    make: () => bytes(`${HEADING}R1,1,4k7${',x'.repeat(300)}\n`),
    problem: { code: 'too-many-columns', row: 2 },
  },
};

describe('a parts list that can’t be read', () => {
  for (const [name, { make, problem }] of Object.entries(REFUSED)) {
    it(`refuses ${name} with its place and a cure`, async () => {
      const reading = await readPartsList(await make(), { fileName: 'list.csv' });
      expect(reading).toMatchObject({ ok: false, ...problem });
      if (reading.ok) throw new Error('it was read');
      expect(reading.detail).toMatch(/\.$/);
      expect(reading.cure).toMatch(/\.$/);
    });
  }

  it('tells how far a long list is, and stops when asked to', async () => {
    const list = bytes(HEADING + 'R1,1,4k7\n'.repeat(60_000));
    const told: number[] = [];
    const stopper = new AbortController();
    const reading = await readPartsList(list, {
      signal: stopper.signal,
      onProgress: (done) => {
        told.push(done);
        if (done >= 20_000) stopper.abort();
      },
    });
    expect(reading).toMatchObject({ ok: false, code: 'cancelled' });
    expect(told.length).toBeGreaterThan(5);
    expect(Math.max(...told)).toBeLessThan(30_000);
  });

  it('names the sheet of a workbook with several', async () => {
    const book = new ExcelJS.Workbook();
    book.addWorksheet('Main').addRows([
      ['Designator', 'Qty', 'Value'],
      ['R1', 1, '4k7'],
    ]);
    book.addWorksheet('Panel').addRows([
      ['Designator', 'Qty', 'Value'],
      ['RV1', -1, 'B10k'],
    ]);
    const reading = await readPartsList(new Uint8Array(await book.xlsx.writeBuffer()));
    expect(reading).toMatchObject({ ok: false, code: 'bad-quantity', sheet: 'Panel', row: 2, column: 'B' });
  });
});

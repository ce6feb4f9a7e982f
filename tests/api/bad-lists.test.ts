/** Lists that can't be read, sent to the running application: each is answered with its place and a cure and changes nothing. */
import { randomUUID } from 'node:crypto';
import ExcelJS from 'exceljs';
import { beforeAll, describe, expect, it } from 'vitest';
import { call, done, listForm } from './calling';

const HEADING = 'Designator,Qty,Value\n';
let circuitId: string;

beforeAll(async () => {
  circuitId = (await done('builder', 'POST', '/circuits', { name: `Bad lists ${randomUUID().slice(0, 8)}` })).id;
});

async function damagedWorkbook(): Promise<Uint8Array> {
  const book = new ExcelJS.Workbook();
  book.addWorksheet('List').addRows([
    ['Designator', 'Qty', 'Value'],
    ['R1', 1, '4k7'],
  ]);
  return new Uint8Array(await book.xlsx.writeBuffer()).subarray(0, 1_200);
}

const protectedWorkbook = (): Uint8Array =>
  new Uint8Array(
    Buffer.concat([
      Buffer.from('d0cf11e0a1b11ae1', 'hex'),
      Buffer.alloc(504),
      Buffer.from('EncryptedPackage', 'utf16le'),
    ]),
  );

const CASES: readonly (readonly [string, string, () => Uint8Array | string | Promise<Uint8Array>, object])[] = [
  ['an empty file', 'list.csv', () => '', { code: 'empty', row: 1, column: 'A' }],
  [
    'a picture named .csv',
    'list.csv',
    () => new Uint8Array(Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex')),
    { code: 'not-a-list', row: 1, column: 'A' },
  ],
  ['a workbook under a password', 'list.xlsx', protectedWorkbook, { code: 'protected', row: 1, column: 'A' }],
  ['a damaged workbook', 'list.xlsx', damagedWorkbook, { code: 'damaged', row: 1, column: 'A' }],
  [
    'a list with no part rows',
    'list.csv',
    () => 'Minutes\nWe met on Tuesday.\n',
    { code: 'no-parts', row: 1, column: 'A' },
  ],
  [
    'a cell of 1 MB',
    'list.csv',
    () => `${HEADING}R1,1,${'x'.repeat(1_048_576)}\n`,
    { code: 'cell-too-long', row: 2, column: 'C' },
  ],
  [
    'a negative quantity',
    'list.csv',
    () => `${HEADING}R1,1,4k7\nR2,-3,1k\n`,
    { code: 'bad-quantity', row: 3, column: 'B' },
  ],
  ['a fractional quantity', 'list.csv', () => `${HEADING}R1,2.5,4k7\n`, { code: 'bad-quantity', row: 2, column: 'B' }],
];

const revisions = async (): Promise<number> =>
  (await done('builder', 'GET', `/circuits/${circuitId}`)).revisions.length;

describe('a list that can’t be read', () => {
  for (const [name, fileName, make, more] of CASES) {
    it(`${name}: a problem with row, column and cure, and nothing changed`, async () => {
      const before = await revisions();
      const answer = await call(
        'builder',
        'POST',
        '/revisions',
        listForm(circuitId, `X${before}`, await make(), fileName),
      );
      expect(answer.type).toContain('application/problem+json');
      expect(answer.body).toMatchObject({ status: 422, code: 'list.unreadable', more });
      expect(answer.body.more.cure).toMatch(/\.$/);
      expect(answer.body.detail).toMatch(/row \d+, column [A-Z]/i);
      expect(await revisions()).toBe(before);
      const original = await call('builder', 'GET', `/uploads/${answer.body.more.uploadId}/original`);
      expect(original.status).toBe(200);
    });
  }

  it('200,001 rows: the job that reads it says where it stops, and no revision is left', async () => {
    const before = await revisions();
    const answer = await call(
      'builder',
      'POST',
      '/revisions',
      listForm(circuitId, 'Long', HEADING + 'R1,1,4k7\n'.repeat(200_001), 'long.csv'),
    );
    let problem = answer.body;
    if (answer.status === 200) {
      for (let attempt = 0; attempt < 100; attempt += 1) {
        const upload = await done('builder', 'GET', `/uploads/${answer.body.uploadId}`);
        problem = upload.problem;
        if (upload.state === 'rejected') break;
        await new Promise((resume) => setTimeout(resume, 300));
      }
    }
    expect(problem).toMatchObject({ code: 'list.unreadable', more: { code: 'too-many-rows', row: 200_001 } });
    expect(await revisions()).toBe(before);
  });

  it('a quantity that disagrees with its designators is asked about with its row, and can’t be frozen before', async () => {
    const made = await done(
      'builder',
      'POST',
      '/revisions',
      listForm(circuitId, 'Asks', `${HEADING}"R1,R2",3,10k\n`, 'list.csv'),
    );
    expect(made.questions).toMatchObject([{ row: 2, code: 'quantity-differs', options: ['2', '3'] }]);
    const frozen = await call('builder', 'POST', `/revisions/${made.id}/freeze`, {});
    expect(frozen).toMatchObject({ status: 422, body: { code: 'list.unsettled' } });
    expect(frozen.body.detail).toMatch(/row 2/i);
  });
});

/** Lists in the shapes people send them, all invented here, each with what a careful builder reads in it. */
import { describe, expect, it } from 'vitest';
import { readPartsList } from '@/lib/parts-list/read-parts-list';

type Row = readonly [
  row: number,
  designators: string,
  quantity: number | null,
  kind: string,
  what: number | string | null,
];

async function read(list: string, fileName = 'list.csv') {
  const reading = await readPartsList(new TextEncoder().encode(list), { fileName });
  if (!reading.ok) throw new Error(`${reading.code}: ${reading.detail}`);
  return reading;
}

async function expectRows(list: string, rows: readonly Row[]): Promise<void> {
  const { lines } = await read(list);
  const got = lines.map(
    (line): Row => [line.row, line.designators.join(' '), line.quantity, line.kind, line.value?.si ?? line.partNumber],
  );
  expect(got).toEqual(rows);
}

const SHAPES: Readonly<Record<string, { list: string; rows: readonly Row[] }>> = {
  'commas, a heading in English, ranges and lists of designators': {
    list: 'Designator,Qty,Value\n"R1-R3, R7",4,4k7\nC1,1,100n\nU1,1,TL072CP\n',
    rows: [
      [2, 'R1 R2 R3 R7', 4, 'resistor', 4700],
      [3, 'C1', 1, 'capacitor', 1e-7],
      [4, 'U1', 1, 'ic', 'TL072CP'],
    ],
  },
  'semicolons, German headings, decimal commas': {
    list: 'Bezeichner;Menge;Wert;Bauform\nR1;1;4,7 kΩ;0207\nC2;1;2,2 µF;radial\nT1;1;BC547C;TO-92\n',
    rows: [
      [2, 'R1', 1, 'resistor', 4700],
      [3, 'C2', 1, 'capacitor', 2.2e-6],
      [4, 'T1', 1, 'transistor', 'BC547C'],
    ],
  },
  'tabs, French headings': {
    list: 'Repère\tQuantité\tValeur\nR1\t1\t10k\nD1 D2\t2\t1N4148\n',
    rows: [
      [2, 'R1', 1, 'resistor', 10_000],
      [3, 'D1 D2', 2, 'diode', '1N4148'],
    ],
  },
  'Spanish, Dutch and Italian headings': {
    list: 'Referencias,Cantidad,Valor\nR1,1,1k\n',
    rows: [[2, 'R1', 1, 'resistor', 1000]],
  },
  'a title and export rows above the heading': {
    list: 'Ramp board,,\nexported,2026-03-01,\n\nReference,Qty,Value\nR1,1,220R\n',
    rows: [[5, 'R1', 1, 'resistor', 220]],
  },
  'no heading at all': {
    list: 'R1,10k,1\nR2,22k,1\nC1,10n,1\nU1,CD4093BE,1\n',
    rows: [
      [1, 'R1', 1, 'resistor', 10_000],
      [2, 'R2', 1, 'resistor', 22_000],
      [3, 'C1', 1, 'capacitor', 1e-8],
      [4, 'U1', 1, 'ic', 'CD4093BE'],
    ],
  },
  'section rows that name the kind of what follows': {
    list: 'Name,Qty\nResistors,\n10k,4\n510,2\nCapacitors,\n104,3\nICs,\n4013,1\n',
    rows: [
      [3, '', 4, 'resistor', 10_000],
      [4, '', 2, 'resistor', 510],
      [6, '', 3, 'capacitor', 1e-7],
      [8, '', 1, 'ic', '4013'],
    ],
  },
  'a total and a note below': {
    list: 'Ref,Qty,Value\nR1,1,1M\n,,\nTotal,1,\nSolder the lowest parts first,,\n',
    rows: [[2, 'R1', 1, 'resistor', 1e6]],
  },
  'a heading that lies: Part holds the designators, Index nothing but numbers': {
    list: 'Index,Part,Qty,Device\n1,R1,1,33k\n2,"R2, R3",2,47k\n',
    rows: [
      [2, 'R1', 1, 'resistor', 33_000],
      [3, 'R2 R3', 2, 'resistor', 47_000],
    ],
  },
  'a value column with volts, the part in the description': {
    list: 'Reference,Qty,Description,Value\nIC1,1,LM4040 shunt reference,10V\nC1,1,"Capacitor, 10uF",25V\nC2,1,"Capacitor, 22uF",16V\n',
    rows: [
      [2, 'IC1', 1, 'ic', 'LM4040'],
      [3, 'C1', 1, 'capacitor', 1e-5],
      [4, 'C2', 1, 'capacitor', 2.2e-5],
    ],
  },
  'two tables side by side': {
    list: 'Ref,Qty,Value,,,,,Ref,Qty,Value\nR1,1,1k,,,,,C1,1,1n\nR2,1,2k2,,,,,C2,1,2n2\n',
    rows: [
      [2, 'R1', 1, 'resistor', 1000],
      [3, 'R2', 1, 'resistor', 2200],
      [2, 'C1', 1, 'capacitor', 1e-9],
      [3, 'C2', 1, 'capacitor', 2.2e-9],
    ],
  },
  'a list of something else beside the parts list': {
    list: 'Ref,Qty,Value,,,,,Net,Pin\nR1,1,1k,,,,,GND,U1-4\nR2,1,2k2,,,,,VCC,U1-8\n',
    rows: [
      [2, 'R1', 1, 'resistor', 1000],
      [3, 'R2', 1, 'resistor', 2200],
    ],
  },
  'the same list twice, one row a designator and then grouped': {
    list: 'Ref,Value\nR1,10k\nR2,10k\nR3,10k\nC1,100n\n\nQty,Ref,Value\n3,"R1, R2, R3",10k\n1,C1,100n\n',
    rows: [
      [8, 'R1 R2 R3', 3, 'resistor', 10_000],
      [9, 'C1', 1, 'capacitor', 1e-7],
    ],
  },
  'quoted line breaks, and rows that count by the file’s own lines': {
    list: 'Ref,Qty,Value\n"R1,\nR2",2,10k\nR3,1,22k\n',
    rows: [
      [2, 'R1 R2', 2, 'resistor', 10_000],
      [4, 'R3', 1, 'resistor', 22_000],
    ],
  },
  'letters that say little: U for a jumper, Q for a crystal, D for an LED': {
    list: 'Ref,Qty,Value,Footprint\nU9,1,JUMPER3,HDR-TH_3P\nQ1,1,"Crystal, 20 MHz",HC49\nD3,1,LED_red,LED_3mm\n',
    rows: [
      [2, 'U9', 1, 'connector', null],
      [3, 'Q1', 1, 'crystal', 2e7],
      [4, 'D3', 1, 'led', null],
    ],
  },
  'Markdown with its rule under the heading': {
    list: '# Ramp\n\n| Refs | Qty | Component |\n| --- | --- | --- |\n| R1, R2 | 2 | 100k |\n| RV1 | 1 | B10k |\n',
    rows: [
      [5, 'R1 R2', 2, 'resistor', 100_000],
      [6, 'RV1', 1, 'potentiometer', 10_000],
    ],
  },
};

describe('a parts list', () => {
  for (const [name, { list, rows }] of Object.entries(SHAPES)) {
    it(`reads ${name}`, () => expectRows(list, rows));
  }

  it('says why a row is no part', async () => {
    const { notLines } = await read('Ramp board,,\nRef,Qty,Value\nR1,1,10k\nTotal,1,\n');
    expect(notLines.map(({ row, why }) => [row, why])).toEqual([
      [1, 'title or note, no part'],
      [2, 'heading, no part'],
      [4, 'total, no part'],
    ]);
  });

  it('takes DNP in any column for not fitted', async () => {
    const { lines } = await read(
      'Ref,Qty,Value,Note\nR1,1,DNP,\nR2,1,10k,do not fit\nR3,1,10k DNF,\nR4,1,10k,fit last\n',
    );
    expect(lines.map((line) => [line.designators[0], line.fitted])).toEqual([
      ['R1', false],
      ['R2', false],
      ['R3', false],
      ['R4', true],
    ]);
  });

  it('asks when the quantity and the designators disagree, naming row, column and both figures', async () => {
    const { lines, questions } = await read('Ref,Qty,Value\n"R1, R2",3,10k\n');
    expect(lines[0]?.quantity).toBe(3);
    expect(questions).toMatchObject([{ row: 2, column: 'B', code: 'quantity-differs', options: ['2', '3'] }]);
  });

  it('says what each column was taken for and why', async () => {
    const { tables } = await read('Ref,Qty,Value,Colour\nR1,1,10k,red\n');
    expect(tables[0]?.columns.map((column) => column.role)).toEqual(['designators', 'quantity', 'value', 'ignore']);
    for (const column of tables[0]?.columns ?? []) expect(column.because).not.toBe('');
  });

  it('follows the roles that a person gave', async () => {
    const list = new TextEncoder().encode('A,B,C\nR1,10k,22k\nR2,33k,47k\n');
    const reading = await readPartsList(list, { columnRoles: [{ sheet: null, index: 2, role: 'value' }] });
    expect(reading.ok && reading.lines.map((line) => line.value?.si)).toEqual([22_000, 47_000]);
  });

  it('reads the same list as UTF-8, UTF-16 with and without its mark, and Windows-1252', async () => {
    const list = 'Ref;Qty;Value\nR1;1;4k7\nC1;1;10µF\n';
    const utf16 = Buffer.from(list, 'utf16le');
    const forms = [
      Buffer.from(list),
      Buffer.concat([Buffer.from([0xef, 0xbb, 0xbf]), Buffer.from(list)]),
      Buffer.concat([Buffer.from([0xff, 0xfe]), utf16]),
      utf16,
      Buffer.from(list, 'latin1'),
    ];
    for (const form of forms) {
      const reading = await readPartsList(form);
      expect(reading.ok && reading.lines.map((line) => line.value?.si)).toEqual([4700, 1e-5]);
    }
  });
});

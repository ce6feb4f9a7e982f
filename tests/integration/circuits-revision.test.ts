import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { and, eq } from 'drizzle-orm';
import { closeDatabase, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { line, revision, upload } from '@/db/schema/circuits';
import { answerQuestion } from '@/lib/circuits/answer-question';
import { changeCircuit } from '@/lib/circuits/change-circuit';
import { changeColumnRole } from '@/lib/circuits/change-column-role';
import { changeLine } from '@/lib/circuits/change-line';
import { compareRevisions } from '@/lib/circuits/compare-revisions';
import { copyRevision } from '@/lib/circuits/copy-revision';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { createRevision } from '@/lib/circuits/create-revision';
import { dropLine } from '@/lib/circuits/drop-line';
import { exportRevision } from '@/lib/circuits/export-revision';
import { freezeRevision } from '@/lib/circuits/freeze-revision';
import { getCircuit } from '@/lib/circuits/get-circuit';
import { readingOfRevision } from '@/lib/circuits/get-reading';
import { getRevision } from '@/lib/circuits/get-revision';
import { getUpload } from '@/lib/circuits/get-upload';
import { listLines } from '@/lib/circuits/list-lines';
import { originalOfRevision, originalOfUpload } from '@/lib/circuits/original-of-revision';
import { takeRowAsLine } from '@/lib/circuits/take-row';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

let ours: TestWorkshop;
let theirs: TestWorkshop;
beforeAll(async () => {
  [ours, theirs] = [await makeWorkshop('Lists'), await makeWorkshop('Others')];
});
afterAll(closeDatabase);

const csv = (...rows: string[]): Uint8Array => new TextEncoder().encode(`${rows.join('\r\n')}\r\n`);
const HEADING = 'Designators,Quantity,Value,Notes';
const SETTLED = csv(HEADING, 'R1 R2,2,4k7,1%', 'C1,1,100n,X7R 50V', 'U1,1,TL072,', 'R9,1,1M,DNF');

const circuitOf = async (workshop = ours): Promise<string> =>
  (await act(createCircuit, workshop.as.builder, { name: `Circuit ${newId()}`, railsVolts: [12, -12] })).id;
const readIn = async (
  bytes: Uint8Array,
  options: { circuitId?: string; name?: string; fileName?: string; freeze?: boolean } = {},
) =>
  act(createRevision, ours.as.builder, {
    circuitId: options.circuitId ?? (await circuitOf()),
    name: options.name ?? 'A',
    file: { name: options.fileName ?? 'main-board.csv', bytes: new Uint8Array(bytes) },
    freeze: options.freeze ?? false,
  });
const linesOf = async (revisionId: string) => (await act(listLines, ours.as.builder, { revisionId })).rows;
const revisionsOf = (workshop: TestWorkshop, circuitId: string) =>
  withWorkshop(workshop.id, (tx) =>
    tx
      .select()
      .from(revision)
      .where(and(eq(revision.workshopId, workshop.id), eq(revision.circuitId, circuitId))),
  );

describe('a parts list read into a revision', () => {
  it('gives a line for each row of parts, in order, with what each asks for', async () => {
    const made = await readIn(SETTLED);
    expect(made).toMatchObject({ state: 'draft', reading: 'done', lines: 4, openQuestions: 0 });
    const lines = await linesOf(made.id);
    expect(lines.map((one) => [one.row, one.designators, one.quantity, one.kind, one.fitted])).toEqual([
      [2, ['R1', 'R2'], 2, 'resistor', true],
      [3, ['C1'], 1, 'capacitor', true],
      [4, ['U1'], 1, 'ic', true],
      [5, ['R9'], 1, 'resistor', false],
    ]);
    expect(lines[0]?.spec).toMatchObject({ value: { significand: 47, exponent: 2, unit: 'ohm' }, tolerancePercent: 1 });
    expect(lines.map((one) => one.standing)).toEqual(['buy', 'buy', 'buy', 'not-fitted']);
    expect(await act(getRevision, ours.as.storekeeper, { revisionId: made.id })).toMatchObject({
      lines: 4,
      designators: 5,
      standings: { buy: 3, 'not-fitted': 1 },
      upload: { fileName: 'main-board.csv', state: 'settled' },
    });
  });

  it('keeps the original byte for byte', async () => {
    const made = await readIn(SETTLED, { fileName: 'Prüfling "1".csv' });
    const sent = await act(originalOfRevision, ours.as.builder, { revisionId: made.id });
    expect(new Uint8Array(await sent.arrayBuffer())).toEqual(SETTLED);
    expect(sent.headers.get('content-disposition')).toMatch(
      /^attachment; filename="Pr_fling _1_\.csv"; filename\*=UTF-8''Pr%C3%BCfling/,
    );
  });

  it('reads a table pasted from a spreadsheet', async () => {
    const made = await act(createRevision, ours.as.builder, {
      circuitId: await circuitOf(),
      name: 'A',
      pasted: 'Designators\tQuantity\tValue\nR1\t1\t10k\nR2\t1\t22k\n',
    });
    expect((await linesOf(made.id)).map((one) => one.text)).toEqual(['10k', '22k']);
  });

  it('shows its thinking: columns with a reason, rows that are no parts, each row beside its line', async () => {
    const made = await readIn(csv(HEADING, ',,Resistors,', 'R1,1,10k,', 'RV1,1,B50k,9 mm'));
    const reading = await act(readingOfRevision, ours.as.builder, { revisionId: made.id });
    const [table] = reading.tables;
    expect(table?.columns.map((one) => one.role).slice(0, 3)).toEqual(['designators', 'quantity', 'value']);
    for (const column of table?.columns ?? []) expect(column.because).not.toBe('');
    const byRow = new Map(table?.rows.map((one) => [one.row, one]));
    expect(byRow.get(2)?.notLine).toBeTruthy();
    expect(byRow.get(3)?.lines.map((one) => one.text)).toEqual(['10k']);
    expect(byRow.get(4)?.questionIds).toHaveLength(1);
  });

  it('the same key makes one revision; two at once with one name make one', async () => {
    const [circuitId, key] = [await circuitOf(), newId()];
    const input = { circuitId, name: 'A', file: { name: 'a.csv', bytes: new Uint8Array(SETTLED) } };
    const first = await act(createRevision, ours.as.builder, input, key);
    expect(await act(createRevision, ours.as.builder, input, key)).toEqual(first);
    await expect(act(createRevision, ours.as.builder, { ...input, name: 'B' }, key)).rejects.toMatchObject({
      code: 'key.reused',
    });
    const race = await Promise.allSettled(
      Array.from({ length: 4 }, () => act(createRevision, ours.as.builder, { ...input, name: 'C' })),
    );
    expect(race.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    for (const one of race)
      if (one.status === 'rejected') expect(one.reason).toMatchObject({ message: expect.any(String) });
    expect((await revisionsOf(ours, circuitId)).map((one) => one.name).sort()).toEqual(['A', 'C']);
  });

  it('a storekeeper, a stranger and somebody signed out change nothing', async () => {
    const circuitId = await circuitOf();
    const input = { circuitId, name: 'A', file: { name: 'a.csv', bytes: new Uint8Array(SETTLED) } };
    await expect(act(createRevision, ours.as.storekeeper, input)).rejects.toMatchObject({ code: 'not-allowed' });
    await expect(act(createRevision, null, input)).rejects.toMatchObject({ code: 'signed-out' });
    await expect(act(createRevision, theirs.as.builder, input)).rejects.toMatchObject({ code: 'not-found' });
    await expect(act(createRevision, ours.as.builder, { circuitId, name: 'A' })).rejects.toMatchObject({
      code: 'input.invalid',
    });
    expect(await revisionsOf(ours, circuitId)).toEqual([]);
  });

  it('another workshop reads none of it: every id is as if it were not there', async () => {
    const made = await readIn(SETTLED);
    const [first] = await linesOf(made.id);
    const lineId = first?.id ?? '';
    const stranger = theirs.as.lead;
    for (const asked of [
      () => act(getRevision, stranger, { revisionId: made.id }),
      () => act(listLines, stranger, { revisionId: made.id }),
      () => act(readingOfRevision, stranger, { revisionId: made.id }),
      () => act(originalOfRevision, stranger, { revisionId: made.id }),
      () => act(getUpload, stranger, { uploadId: made.uploadId }),
      () => act(freezeRevision, stranger, { revisionId: made.id }),
      () => act(changeLine, stranger, { lineId, quantity: 9 }),
      () => act(dropLine, stranger, { lineId }),
    ]) {
      await expect(asked()).rejects.toMatchObject({ code: 'not-found' });
    }
    expect((await linesOf(made.id))[0]?.quantity).toBe(2);
  });
});

describe('a list that can’t be read', () => {
  const bad: readonly (readonly [string, Uint8Array])[] = [
    ['an empty file', new Uint8Array()],
    ['a picture named .csv', new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13])],
    ['a list with no part rows', csv('To do', 'buy milk', 'call home')],
    ['a negative quantity', csv(HEADING, 'R1,-2,10k,')],
    ['a fractional quantity', csv(HEADING, 'R1,1.5,10k,')],
  ];
  for (const [what, bytes] of bad) {
    it(`${what} changes nothing, says why and how to mend it, and the file is kept`, async () => {
      const circuitId = await circuitOf();
      const problem = await readIn(bytes, { circuitId, fileName: 'list.csv' }).catch((error: unknown) => error);
      expect(problem).toMatchObject({
        code: 'list.unreadable',
        errors: [{ code: expect.any(String) }],
        more: { cure: expect.stringMatching(/./), uploadId: expect.any(String) },
      });
      expect(await revisionsOf(ours, circuitId)).toEqual([]);
      const { rejected } = await act(getCircuit, ours.as.builder, { circuitId });
      expect(rejected).toMatchObject([{ fileName: 'list.csv', problem: { code: 'list.unreadable' } }]);
      const original = await act(originalOfUpload, ours.as.builder, { uploadId: rejected[0]?.id ?? '' });
      expect(new Uint8Array(await original.arrayBuffer())).toEqual(bytes);
    });
  }

  it('a bad quantity is told with its row and column', async () => {
    await expect(readIn(csv(HEADING, 'R1,1,10k,', 'R2,-2,10k,'))).rejects.toMatchObject({
      more: { row: 3, column: expect.anything() },
    });
  });
});

describe('questions', () => {
  const DOUBTFUL = csv(HEADING, 'R7,1,2.2m,5%', 'C3 C4 C5 C6,3,100n,X7R', 'RV1,1,B50k,');

  it('keep a revision from being frozen, also when freezing was asked for at once', async () => {
    const made = await readIn(DOUBTFUL, { freeze: true });
    expect(made.state).toBe('draft');
    expect(made.questions.map((one) => one.row)).toEqual([2, 3, 4]);
    await expect(act(freezeRevision, ours.as.builder, { revisionId: made.id })).rejects.toMatchObject({
      code: 'list.unsettled',
      errors: [{ pointer: 'row 2' }, { pointer: 'row 3' }, { pointer: 'row 4' }],
    });
    expect((await act(getRevision, ours.as.builder, { revisionId: made.id })).state).toBe('draft');
  });

  it('are answered with an option or in own words, each changes its line, and then it freezes', async () => {
    const made = await readIn(DOUBTFUL);
    const [mega, count, taper] = made.questions;
    await expect(
      act(answerQuestion, ours.as.builder, { questionId: count?.id ?? '', answer: 'some' }),
    ).rejects.toMatchObject({ code: 'input.invalid' });
    await act(answerQuestion, ours.as.builder, { questionId: mega?.id ?? '', answer: '2.2 MΩ' });
    await act(answerQuestion, ours.as.builder, { questionId: count?.id ?? '', answer: '4' });
    const last = await act(answerQuestion, ours.as.builder, { questionId: taper?.id ?? '', answer: 'linear' });
    expect(last.openQuestions).toBe(0);
    const lines = await linesOf(made.id);
    expect(lines[0]?.spec.value).toEqual({ significand: 22, exponent: 5, unit: 'ohm' });
    expect(lines[1]?.quantity).toBe(4);
    expect(lines[2]?.spec.taper).toBe('linear');
    await expect(
      act(answerQuestion, ours.as.builder, { questionId: mega?.id ?? '', answer: '2.2 mΩ' }),
    ).rejects.toMatchObject({ code: 'state.refused' });
    expect((await act(freezeRevision, ours.as.builder, { revisionId: made.id })).state).toBe('frozen');
  });

  it('a remembered taper letter is not asked again in this workshop, but still in another', async () => {
    const shop = await makeWorkshop('Tapers');
    const list = { file: { name: 'pots.csv', bytes: new Uint8Array(csv(HEADING, 'RV1,1,B50k,')) } };
    const first = await act(createRevision, shop.as.builder, { circuitId: await circuitOf(shop), name: 'A', ...list });
    await act(answerQuestion, shop.as.builder, {
      questionId: first.questions[0]?.id ?? '',
      answer: 'linear',
      remember: true,
    });
    const second = await act(createRevision, shop.as.builder, { circuitId: await circuitOf(shop), name: 'A', ...list });
    expect(second.openQuestions).toBe(0);
    expect((await act(listLines, shop.as.builder, { revisionId: second.id })).rows[0]?.spec.taper).toBe('linear');
    expect((await readIn(csv(HEADING, 'RV1,1,B50k,'))).openQuestions).toBe(1);
  });
});

describe('correcting a draft', () => {
  it('a line takes another quantity, text and designators; a wrong text is refused and changes nothing', async () => {
    const made = await readIn(SETTLED);
    const [first] = await linesOf(made.id);
    const lineId = first?.id ?? '';
    await act(changeLine, ours.as.builder, { lineId, quantity: 3, designators: ['R1', 'R2', 'R3'], text: '4k99 0.1%' });
    expect((await linesOf(made.id))[0]).toMatchObject({
      quantity: 3,
      designators: ['R1', 'R2', 'R3'],
      spec: { value: { significand: 499, exponent: 1 }, tolerancePercent: 0.1 },
    });
    await expect(act(changeLine, ours.as.builder, { lineId, text: '2.2m' })).rejects.toMatchObject({
      code: 'input.invalid',
    });
    await expect(act(changeLine, ours.as.builder, { lineId, quantity: 1.5 })).rejects.toMatchObject({
      code: 'input.invalid',
    });
    await expect(act(changeLine, ours.as.builder, { lineId, quantity: -1 })).rejects.toMatchObject({
      code: 'input.invalid',
    });
    expect((await linesOf(made.id))[0]?.text).toBe('4k99 0.1%');
  });

  it('a row that is no part goes, and one that was passed over comes', async () => {
    const made = await readIn(csv(HEADING, ',,4 spacers M3,', 'R1,1,10k,', 'J1,1,test pad,'));
    const lines = await linesOf(made.id);
    await act(dropLine, ours.as.builder, { lineId: lines[1]?.id ?? '' });
    await act(takeRowAsLine, ours.as.builder, { revisionId: made.id, row: 2, quantity: 4, kind: 'hardware' });
    expect((await linesOf(made.id)).map((one) => [one.row, one.kind, one.quantity])).toEqual([
      [3, 'resistor', 1],
      [2, 'hardware', 4],
    ]);
    const reading = await act(readingOfRevision, ours.as.builder, { revisionId: made.id });
    expect(reading.notLines.map((one) => one.row)).toContain(4);
    expect(reading.notLines.map((one) => one.row)).not.toContain(2);
    await expect(act(takeRowAsLine, ours.as.builder, { revisionId: made.id, row: 2 })).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it('a column that was taken for the wrong thing is read again, and answers stay', async () => {
    const made = await readIn(csv('Designators,Quantity,Value,Spare', 'R1,1,10k,22k', 'RV1,1,B50k,A10k'));
    await act(answerQuestion, ours.as.builder, { questionId: made.questions[0]?.id ?? '', answer: 'linear' });
    const again = await act(changeColumnRole, ours.as.builder, { revisionId: made.id, index: 3, role: 'ignore' });
    expect(again).toMatchObject({ lines: 2, openQuestions: 0 });
    expect((await linesOf(made.id)).map((one) => one.spec.value?.significand)).toEqual([1, 5]);
    expect((await linesOf(made.id))[1]?.spec.taper).toBe('linear');
  });

  it('who looks at an older version is told, and nothing is written', async () => {
    const made = await readIn(SETTLED);
    const [first] = await linesOf(made.id);
    await act(changeLine, ours.as.builder, { lineId: first?.id ?? '', quantity: 5 });
    await expect(act(freezeRevision, ours.as.builder, { revisionId: made.id, version: 1 })).rejects.toMatchObject({
      code: 'version.stale',
      more: { version: 2 },
    });
    const { version } = await act(getCircuit, ours.as.builder, {
      circuitId: (await act(getRevision, ours.as.builder, { revisionId: made.id })).circuit.id,
    });
    const circuitId = (await act(getRevision, ours.as.builder, { revisionId: made.id })).circuit.id;
    await act(changeCircuit, ours.as.builder, { circuitId, version, railsVolts: [5] });
    await expect(act(changeCircuit, ours.as.builder, { circuitId, version, railsVolts: [9] })).rejects.toMatchObject({
      code: 'version.stale',
    });
    expect((await act(getCircuit, ours.as.builder, { circuitId })).railsVolts).toEqual([5]);
  });
});

describe('a frozen revision', () => {
  it('never changes: not by commands, not by SQL; only what a line is used for may be said', async () => {
    const made = await readIn(SETTLED, { freeze: true });
    expect(made.state).toBe('frozen');
    const before = await linesOf(made.id);
    const lineId = before[0]?.id ?? '';
    for (const tried of [
      () => act(changeLine, ours.as.builder, { lineId, quantity: 9 }),
      () => act(dropLine, ours.as.builder, { lineId }),
      () => act(takeRowAsLine, ours.as.builder, { revisionId: made.id, row: 1, text: '10k' }),
      () => act(changeColumnRole, ours.as.builder, { revisionId: made.id, index: 3, role: 'ignore' }),
      () => act(freezeRevision, ours.as.builder, { revisionId: made.id }),
    ]) {
      await expect(tried()).rejects.toMatchObject({ code: 'state.refused' });
    }
    await expect(
      withWorkshop(ours.id, (tx) => tx.update(line).set({ quantity: 9 }).where(eq(line.id, lineId))),
    ).rejects.toThrow();
    await act(changeLine, ours.as.builder, { lineId, use: 'timing' });
    const after = await linesOf(made.id);
    expect(after.map((one) => ({ ...one, use: null }))).toEqual(before.map((one) => ({ ...one, use: null })));
    expect(after[0]?.use).toBe('timing');
    const [kept] = await withWorkshop(ours.id, (tx) => tx.select().from(upload).where(eq(upload.id, made.uploadId)));
    expect(kept?.state).toBe('frozen');
  });

  it('is copied into a draft, and the two are compared by designator and by part', async () => {
    const made = await readIn(SETTLED, { freeze: true });
    const copy = await act(copyRevision, ours.as.builder, { revisionId: made.id, name: 'B' });
    await expect(act(copyRevision, ours.as.builder, { revisionId: made.id, name: 'B' })).rejects.toMatchObject({
      cause: expect.anything(),
    });
    const lines = await linesOf(copy.id);
    await act(changeLine, ours.as.builder, { lineId: lines[0]?.id ?? '', text: '5k1 1%' });
    await act(dropLine, ours.as.builder, { lineId: lines[1]?.id ?? '' });
    const compared = await act(compareRevisions, ours.as.builder, { revisionId: copy.id, with: made.id });
    expect(compared.byDesignator.map((one) => [one.change, one.designators])).toEqual([
      ['part', ['R1', 'R2']],
      ['gone', ['C1']],
    ]);
    expect(compared.byPart.map((one) => [one.text, one.before, one.after])).toEqual([
      ['4k7 1%', 2, 0],
      ['100n X7R 50V', 1, 0],
      ['5k1 1%', 0, 2],
    ]);
  });

  it('goes out as a CSV that reads back to the same lines, with no cell that a spreadsheet would run', async () => {
    const made = await readIn(csv(HEADING, 'R1 R2,2,4k7,1%', 'J1,1,=2+5,', 'R9,1,1M,DNF'), { freeze: true });
    const text = await (await act(exportRevision, ours.as.buyer, { revisionId: made.id })).text();
    for (const cell of text.split(/[\r\n,]+/)) expect(cell).not.toMatch(/^[=+\-@\t]/);
    const again = await readIn(new TextEncoder().encode(text));
    const shape = (rows: Awaited<ReturnType<typeof linesOf>>) =>
      rows
        .filter((one) => one.kind === 'resistor')
        .map((one) => [one.designators, one.quantity, one.fitted, one.spec.value, one.spec.tolerancePercent]);
    expect(shape(await linesOf(again.id))).toEqual(shape(await linesOf(made.id)));
  });
});

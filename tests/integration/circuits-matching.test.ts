import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { assessPart } from '@/lib/circuits/assess-part';
import { changeCircuit } from '@/lib/circuits/change-circuit';
import { changeLine } from '@/lib/circuits/change-line';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { createRevision } from '@/lib/circuits/create-revision';
import { decideLine } from '@/lib/circuits/decide-line';
import { getRevision } from '@/lib/circuits/get-revision';
import { lineCandidates } from '@/lib/circuits/line-candidates';
import { listLines } from '@/lib/circuits/list-lines';
import { matchRevision, matchStockChanged } from '@/lib/circuits/match-revision';
import { standIn } from '@/lib/circuits/stand-in';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';
import { makeShelf, type Shelf } from './circuits-shelf';

let shop: TestWorkshop;
let other: TestWorkshop;
let put: Shelf;
const part: Record<string, string> = {};

async function shelf(text: string, quantity: number, bin?: string): Promise<string> {
  const id = await put(text, quantity, bin);
  part[text] = id;
  return id;
}

beforeAll(async () => {
  [shop, other] = [await makeWorkshop('Shelf'), await makeWorkshop('Elsewhere')];
  put = await makeShelf(shop);
  await shelf('CD4011BE', 24, 'A-02-1');
  await shelf('HEF4093BP', 6, 'A-02-2');
  await shelf('CD4093BE', 0);
  await shelf('TL072CP', 17);
  await shelf('51k 1% 0.25W', 40, 'A-03-1');
  await shelf('39k 1% 0.25W', 40, 'A-03-1');
  await shelf('130k 1% 0.25W', 12, 'A-03-2');
  await shelf('4k7 1% 0.25W', 212, 'A-03-3');
  await shelf('100n X7R 63V', 96, 'A-04-1');
});
afterAll(closeDatabase);

async function listOf(rows: readonly string[], railsVolts: number[] = [12, -12]): Promise<string> {
  const circuit = await act(createCircuit, shop.as.builder, { name: `Circuit ${newId()}`, railsVolts });
  const pasted = ['Designators\tQuantity\tValue', ...rows].join('\n');
  return (await act(createRevision, shop.as.builder, { circuitId: circuit.id, name: 'A', pasted, freeze: true })).id;
}
const linesOf = async (revisionId: string, units = 1) =>
  (await act(listLines, shop.as.builder, { revisionId, units })).rows;
const firstLine = async (revisionId: string) => {
  const [line] = await linesOf(revisionId);
  if (!line) throw new Error('the list has no line');
  return line;
};
const sheetOf = async (rows: readonly string[], rails?: number[]) => {
  const revisionId = await listOf(rows, rails);
  const line = await firstLine(revisionId);
  return { revisionId, line, sheet: await act(lineCandidates, shop.as.storekeeper, { lineId: line.id }) };
};

describe('what the shelf has for a line', () => {
  it('is the part asked for, where everything asked is said of it: by value and by number', async () => {
    const lines = await linesOf(await listOf(['R1 R2\t2\t4k7 1%', 'U1\t1\tTL072']));
    expect(lines.map((one) => [one.verdict, one.standing, one.chosen?.part.id, one.chosen?.free])).toEqual([
      ['same', 'shelf', part['4k7 1% 0.25W'], 212],
      ['same', 'shelf', part.TL072CP, 17],
    ]);
    expect(lines[0]?.chosen?.bins).toMatchObject([{ code: 'A-03-3', free: 212 }]);
  });

  it('a higher voltage drops in', async () => {
    expect(await firstLine(await listOf(['C1\t1\t100n X7R 50V']))).toMatchObject({
      verdict: 'drop-in',
      standing: 'shelf',
    });
  });

  it('the nearest stocked value is offered with its deviation, and is not taken unasked', async () => {
    const line = await firstLine(await listOf(['R1\t1\t47k 1%']));
    expect(line).toMatchObject({
      verdict: 'with-effect',
      standing: 'effect',
      chosen: null,
      best: { part: { id: part['51k 1% 0.25W'] } },
    });
    // 51/47 = 1.0851…
    expect(line.best?.deviationPercent).toBeCloseTo(8.51, 2);
    // 39 k is more than a sixth below 47 k and the other way of the nearest.
    const sheet = await act(lineCandidates, shop.as.builder, { lineId: line.id });
    expect(sheet.candidates.map((one) => one.part.id)[0]).toBe(part['51k 1% 0.25W']);
  });

  it('is measured by the units to be made, and lines that share a part share its stock', async () => {
    const revisionId = await listOf(['U1\t1\tTL072', 'U2 U3\t2\tTL072']);
    expect((await linesOf(revisionId, 5)).map((one) => [one.need, one.standing])).toEqual([
      [5, 'shelf'],
      [10, 'shelf'],
    ]);
    expect((await linesOf(revisionId, 6)).map((one) => one.standing)).toEqual(['shelf', 'buy']);
    expect((await act(getRevision, shop.as.buyer, { revisionId, units: 6 })).standings).toMatchObject({
      shelf: 1,
      buy: 1,
    });
  });

  it('a line without anything on the shelf is to buy', async () => {
    expect(await firstLine(await listOf(['U1\t1\tLM13700']))).toMatchObject({
      verdict: null,
      standing: 'buy',
      chosen: null,
      best: null,
    });
  });

  it('lists are filtered by standing, verdict and words', async () => {
    const revisionId = await listOf(['R1\t1\t4k7 1%', 'R2\t1\t47k 1%', 'U1\t1\tLM13700']);
    const rows = async (input: Partial<Parameters<typeof listLines.run>[0]['input']>) =>
      (await act(listLines, shop.as.builder, { revisionId, ...input })).rows.map((one) => one.designators[0]);
    expect(await rows({ standing: ['effect', 'buy'] })).toEqual(['R2', 'U1']);
    expect(await rows({ verdict: ['same'] })).toEqual(['R1']);
    expect(await rows({ search: 'u1' })).toEqual(['U1']);
    expect(await rows({ size: 1, page: 2 })).toEqual(['R2']);
  });
});

describe('a plain NAND for a Schmitt NAND that times', () => {
  it('is offered and refused with the reason, and the Schmitt part of another maker is proposed instead', async () => {
    const { line } = await sheetOf(['U3\t1\tCD4093BE'], [12]);
    await act(changeLine, shop.as.builder, { lineId: line.id, use: 'timing' });
    const sheet = await act(lineCandidates, shop.as.builder, { lineId: line.id });
    const plain = sheet.candidates.find((one) => one.part.id === part.CD4011BE);
    expect(plain).toMatchObject({ verdict: 'refused', free: 24, bins: [{ code: 'A-02-1' }] });
    expect(plain?.checks).toContainEqual(expect.objectContaining({ check: 'schmitt-inputs', outcome: 'fail' }));
    expect(sheet.insteadPartId).toBe(part.HEF4093BP);
  });

  it('can’t be chosen: the refusal says why and nothing is decided', async () => {
    const { line } = await sheetOf(['U3\t1\tCD4093BE'], [12]);
    await act(changeLine, shop.as.builder, { lineId: line.id, use: 'timing' });
    await expect(
      act(decideLine, shop.as.builder, { lineId: line.id, partId: part.CD4011BE ?? '', reason: 'it will do' }),
    ).rejects.toMatchObject({ code: 'rule.forbids', errors: [{ code: 'schmitt-inputs' }] });
    expect((await act(lineCandidates, shop.as.builder, { lineId: line.id })).decisions).toEqual([]);
  });
});

describe('a decision', () => {
  it('holds for its line until the next one, and null leaves the line to be bought', async () => {
    const { revisionId, line } = await sheetOf(['R1\t1\t47k 1%']);
    await act(decideLine, shop.as.builder, {
      lineId: line.id,
      partId: part['51k 1% 0.25W'] ?? '',
      reason: 'sets no figure',
    });
    expect(await firstLine(revisionId)).toMatchObject({
      chosen: { part: { id: part['51k 1% 0.25W'] } },
      decision: { reason: 'sets no figure', by: 'Test builder' },
    });
    await act(decideLine, shop.as.builder, { lineId: line.id, partId: null, reason: 'wait for the right one' });
    expect(await firstLine(revisionId)).toMatchObject({ chosen: null, standing: 'buy', decision: { partId: null } });
    expect(
      (await act(lineCandidates, shop.as.builder, { lineId: line.id })).decisions.map((one) => one.partId),
    ).toEqual([null, part['51k 1% 0.25W']]);
  });

  it('is offered again first where another list asks for the same, spelled otherwise; one not to be remembered is not', async () => {
    const first = await sheetOf(['R1\t1\t120k 1%']);
    await act(decideLine, shop.as.builder, {
      lineId: first.line.id,
      partId: part['130k 1% 0.25W'] ?? '',
      reason: 'measured near',
    });
    const again = await sheetOf(['R8\t1\t0.12M 1%']);
    expect(again.sheet.candidates[0]).toMatchObject({ part: { id: part['130k 1% 0.25W'] }, remembered: true });
    expect(again.sheet.remembered).toMatchObject({ partId: part['130k 1% 0.25W'], reason: 'measured near' });
    // Offered, not taken: a figure moves, so a person says so.
    expect(again.line.chosen).toBeNull();
    const quiet = await sheetOf(['R1\t1\t36k 1%']);
    await act(decideLine, shop.as.builder, {
      lineId: quiet.line.id,
      partId: part['39k 1% 0.25W'] ?? '',
      reason: 'this once',
      remember: false,
    });
    expect((await sheetOf(['R1\t1\t36k 1%'])).sheet.remembered).toBeNull();
  });

  it('on what the checks can’t tell needs a reason', async () => {
    const { line } = await sheetOf(['C1\t1\t100n']);
    const partId = part['100n X7R 63V'] ?? '';
    expect(await act(assessPart, shop.as.storekeeper, { lineId: line.id, partId })).toMatchObject({ verdict: 'ask' });
    await expect(act(decideLine, shop.as.builder, { lineId: line.id, partId })).rejects.toMatchObject({
      code: 'input.invalid',
      errors: [{ pointer: '/reason' }],
    });
    expect(
      await act(decideLine, shop.as.builder, { lineId: line.id, partId, reason: 'decoupling only' }),
    ).toMatchObject({ verdict: 'ask' });
  });

  it('is a builder’s: a storekeeper, another workshop and somebody signed out decide nothing; the same key decides once', async () => {
    const { line } = await sheetOf(['U1\t1\tTL072']);
    const wish = { lineId: line.id, partId: part.TL072CP ?? '', reason: '' };
    await expect(act(decideLine, shop.as.storekeeper, wish)).rejects.toMatchObject({ code: 'not-allowed' });
    await expect(act(decideLine, other.as.builder, wish)).rejects.toMatchObject({ code: 'not-found' });
    await expect(act(decideLine, null, wish)).rejects.toMatchObject({ code: 'signed-out' });
    await expect(act(decideLine, shop.as.builder, { ...wish, partId: newId() })).rejects.toMatchObject({
      code: 'not-found',
    });
    const key = newId();
    const first = await act(decideLine, shop.as.builder, wish, key);
    expect(await act(decideLine, shop.as.builder, wish, key)).toEqual(first);
    expect((await act(lineCandidates, shop.as.builder, { lineId: line.id })).decisions).toHaveLength(1);
  });
});

describe('matching again', () => {
  it('a part that comes later is found for open revisions, and repeating the job changes nothing', async () => {
    const revisionId = await listOf(['Q1\t1\tBC547B']);
    expect((await firstLine(revisionId)).chosen).toBeNull();
    const id = await shelf('BC547B', 30);
    const job = { id: newId(), workshopId: shop.id, payload: { partIds: [id] } };
    await matchStockChanged(job);
    expect(await firstLine(revisionId)).toMatchObject({ verdict: 'same', chosen: { part: { id } } });
    const before = await linesOf(revisionId);
    await matchStockChanged(job);
    await matchRevision({ id: newId(), workshopId: shop.id, payload: { revisionId } });
    expect(await linesOf(revisionId)).toEqual(before);
  });

  it('other rails give other verdicts', async () => {
    await shelf('MCP6002-I/P', 9);
    const revisionId = await listOf(['U1\t1\tTLC272'], [5]);
    const line = await firstLine(revisionId);
    const weigh = () => act(assessPart, shop.as.builder, { lineId: line.id, partId: part['MCP6002-I/P'] ?? '' });
    const atFive = await weigh();
    const { circuit } = await act(getRevision, shop.as.builder, { revisionId });
    await act(changeCircuit, shop.as.builder, { circuitId: circuit.id, version: 1, railsVolts: [12, -12] });
    expect((await weigh()).verdict).toBe('refused');
    expect(atFive.verdict).not.toBe('refused');
  });
});

describe('the stand-in question without a list', () => {
  it('answers as the checks do, and says which text it can’t read', async () => {
    const answer = await act(standIn, shop.as.storekeeper, {
      wanted: 'CD4093BE',
      offered: 'CD4011BE',
      rails: '+5',
      use: 'timing',
    });
    expect(answer.verdict).toBe('refused');
    expect(answer.checks).toContainEqual(expect.objectContaining({ check: 'schmitt-inputs', outcome: 'fail' }));
    await expect(act(standIn, shop.as.storekeeper, { wanted: '???', offered: 'TL072' })).rejects.toMatchObject({
      code: 'input.invalid',
      errors: [{ pointer: '/wanted' }],
    });
    await expect(
      act(standIn, shop.as.storekeeper, { wanted: 'TL072', offered: 'TL072', rails: '-12,+12' }),
    ).rejects.toMatchObject({ code: 'input.invalid', errors: [{ pointer: '/rails' }] });
  });
});

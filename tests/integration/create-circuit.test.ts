import { describe, expect, it, beforeAll, afterAll } from 'vitest';
import { sql } from 'drizzle-orm';
import { closeDatabase, withWorkshop } from '@/db/client';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { listCircuits } from '@/lib/circuits/list-circuits';
import { newId } from '@/db/schema/new-id';
import { perform } from '@/lib/api/perform';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

let ours: TestWorkshop;
let theirs: TestWorkshop;
beforeAll(async () => {
  [ours, theirs] = [await makeWorkshop('Ours'), await makeWorkshop('Theirs')];
});
afterAll(closeDatabase);

const circuitsOf = async (workshop: TestWorkshop) =>
  (await act(listCircuits, workshop.as.builder, {})).rows.map((row) => row.name);

describe('starting a circuit', () => {
  it('a builder starts one and everybody of the workshop sees it, the other workshop does not', async () => {
    await act(createCircuit, ours.as.builder, { name: 'Slope pair', railsVolts: [12, -12] });
    expect(await circuitsOf(ours)).toContain('Slope pair');
    expect(await circuitsOf(theirs)).not.toContain('Slope pair');
  });

  it('a query that forgets its where returns nothing of another workshop', async () => {
    const rows = await withWorkshop(theirs.id, (tx) => tx.execute(sql`select name from circuit`));
    expect(rows.rows.map((row) => row.name)).not.toContain('Slope pair');
  });

  it('refuses a storekeeper, somebody signed out, and an ended session, and changes nothing', async () => {
    const before = await circuitsOf(ours);
    await expect(act(createCircuit, ours.as.storekeeper, { name: 'No' })).rejects.toMatchObject({
      code: 'not-allowed',
    });
    await expect(act(createCircuit, null, { name: 'No' })).rejects.toMatchObject({ code: 'signed-out' });
    const ended = { ...ours.as.builder, via: 'session' as const, sessionEpoch: 99 };
    await expect(act(createCircuit, ended, { name: 'No' })).rejects.toMatchObject({ code: 'signed-out' });
    expect(await circuitsOf(ours)).toEqual(before);
  });

  it('names the field that is wrong, unknown ones too', async () => {
    await expect(act(createCircuit, ours.as.builder, { name: 'Bad rail', railsVolts: [0] })).rejects.toMatchObject({
      code: 'input.invalid',
      errors: [{ pointer: '/railsVolts/0' }],
    });
    const unknown = perform(createCircuit, {
      credentials: ours.as.builder,
      input: { name: 'X', workshopId: theirs.id },
      requestId: newId(),
      idempotencyKey: null,
    });
    await expect(unknown).rejects.toMatchObject({ code: 'input.invalid' });
  });

  it('a taken name is a conflict that says so', async () => {
    await act(createCircuit, ours.as.builder, { name: 'Twice' });
    await expect(act(createCircuit, ours.as.builder, { name: 'Twice' })).rejects.toMatchObject({ code: 'name.taken' });
  });

  it('the same key answers the same circuit; with another body it is refused; two at once make one', async () => {
    const key = newId();
    const first = await act(createCircuit, ours.as.builder, { name: 'Once' }, key);
    expect(await act(createCircuit, ours.as.builder, { name: 'Once' }, key)).toEqual(first);
    await expect(act(createCircuit, ours.as.builder, { name: 'Other' }, key)).rejects.toMatchObject({
      code: 'key.reused',
    });
    const race = await Promise.allSettled(
      Array.from({ length: 6 }, () => act(createCircuit, ours.as.builder, { name: 'Raced' }, 'race')),
    );
    for (const one of race)
      if (one.status === 'rejected') expect(one.reason).toMatchObject({ code: 'request.running' });
    expect((await circuitsOf(ours)).filter((name) => name === 'Raced')).toHaveLength(1);
  });
});

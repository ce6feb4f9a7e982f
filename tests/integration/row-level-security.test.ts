/** What PostgreSQL itself holds, whatever the application does: rows of one workshop, the ledger, amounts that never go below zero. */
import { sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { withScope, withWorkshop } from '@/db/client';
import { makeBins, makePart, stock } from '../support/shelf';
import { makeWorkshop, type TestWorkshop } from '../support/workshop';

let ours: TestWorkshop;
let theirs: TestWorkshop;

beforeAll(async () => {
  ours = await makeWorkshop('Ours');
  theirs = await makeWorkshop('Theirs');
  const bins = await makeBins(ours);
  await stock(ours, await makePart(ours, '10k 1%'), Object.values(bins)[0], 25);
});

/** The database's own word, under whatever wrapping it arrives. */
async function refusal(work: Promise<unknown>): Promise<string> {
  try {
    await work;
    return 'done';
  } catch (error) {
    const messages: string[] = [];
    for (let at: unknown = error; at instanceof Error; at = at.cause) messages.push(at.message);
    return messages.join(' / ');
  }
}

describe('row-level security', () => {
  it('is on and forced, with a policy, for every table that belongs to a workshop', async () => {
    const found = await withScope('auth', (tx) =>
      tx.execute<{ table: string; on: boolean; forced: boolean; policies: number }>(sql`
        select c.relname as table, c.relrowsecurity as on, c.relforcerowsecurity as forced,
               (select count(*)::int from pg_policy p where p.polrelid = c.oid) as policies
          from pg_class c join pg_namespace n on n.oid = c.relnamespace join pg_attribute a on a.attrelid = c.oid and a.attname = 'workshop_id' and not a.attisdropped
         where n.nspname = 'public' and c.relkind in ('r', 'p')`),
    );
    expect(found.rows.length).toBeGreaterThan(20);
    expect(found.rows.filter((one) => !one.on || !one.forced || one.policies === 0)).toEqual([]);
  });

  it('binds a role that owns nothing, is no superuser and can’t pass it by', async () => {
    const found = await withScope('auth', (tx) =>
      tx.execute<{ super: boolean; bypass: boolean; createrole: boolean; owned: number }>(sql`
        select r.rolsuper as super, r.rolbypassrls as bypass, r.rolcreaterole as createrole,
               (select count(*)::int from pg_class c where c.relowner = r.oid) as owned
          from pg_roles r where r.rolname = current_user`),
    );
    expect(found.rows).toEqual([{ super: false, bypass: false, createrole: false, owned: 0 }]);
  });

  it('shows a workshop its own rows only, and none where no workshop is named', async () => {
    const lots = (tx: { execute: (query: ReturnType<typeof sql>) => Promise<{ rows: unknown[] }> }) =>
      tx.execute(sql`select id from lot`);
    expect((await withWorkshop(ours.id, lots)).rows.length).toBe(1);
    expect((await withWorkshop(theirs.id, lots)).rows).toEqual([]);
    expect((await withScope('auth', lots).catch(() => ({ rows: [] }))).rows).toEqual([]);
  });

  it('lets nobody write a row for another workshop', async () => {
    const said = await refusal(
      withWorkshop(theirs.id, (tx) =>
        tx.execute(sql`insert into circuit (workshop_id, id, name) values (${ours.id}, gen_random_uuid(), 'stolen')`),
      ),
    );
    expect(said).toMatch(/row-level security|permission denied/);
  });
});

describe('the ledger', () => {
  it('can be added to, never changed or taken from', async () => {
    for (const statement of [
      sql`update movement set quantity = 1`,
      sql`delete from movement`,
      sql`update audit_event set command = 'x'`,
      sql`delete from audit_event`,
    ]) {
      expect(await refusal(withWorkshop(ours.id, (tx) => tx.execute(statement)))).toMatch(
        /permission denied|append|never/i,
      );
    }
  });

  it('is the only way to what is on hand: a lot’s figure can’t be written by itself', async () => {
    const said = await refusal(withWorkshop(ours.id, (tx) => tx.execute(sql`update lot set on_hand = on_hand + 5`)));
    expect(said).not.toBe('done');
  });

  it('takes no movement that would leave less than nothing', async () => {
    const said = await refusal(
      withWorkshop(ours.id, async (tx) => {
        const [lot] = (
          await tx.execute<{ id: string; part_id: string; bin_id: string }>(sql`select id, part_id, bin_id from lot`)
        ).rows;
        await tx.execute(sql`
          insert into movement (workshop_id, id, kind, lot_id, part_id, bin_id, quantity, balance_after, reference_type, reference_id, request_key, person_id)
          values (${ours.id}, gen_random_uuid(), 'scrap', ${lot?.id}, ${lot?.part_id}, ${lot?.bin_id}, -26, -1, 'test', gen_random_uuid(), gen_random_uuid()::text, ${ours.as.lead.personId})`);
      }),
    );
    expect(said).toMatch(/check|negative|less than|below|enough/i);
  });
});

/**
 * Writes the demo: Fernhollow Synth Works with everything in it, and a second workshop to show that neither sees the
 * other. Refuses a database that has a workshop already. The sign-ins go to SIGN_INS_FILE (.data/sign-ins.txt).
 */
import './load-environment';
import { randomBytes } from 'node:crypto';
import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { closeDatabase, withScope } from '@/db/client';
import { workshop } from '@/db/schema/people';
import { decideUsual, makeBatches, makeCircuits } from '../seed/making';
import { makeOffers, makeOrders, makeSuppliers } from '../seed/buying';
import { FERNHOLLOW, LARKSPUR, makeWorkshop } from '../seed/people';
import { makeShelf } from '../seed/shelf';

async function main(): Promise<void> {
  const there = await withScope('auth', (tx) => tx.select({ name: workshop.name }).from(workshop).limit(1));
  if (there.length > 0)
    throw new Error(
      `this database has a workshop already (${there[0]?.name}); the demo is only written into an empty one`,
    );
  const password = `${randomBytes(9).toString('base64url')}-bench`;

  const fernhollow = await makeWorkshop(
    'Fernhollow Synth Works',
    'Fernhollow Synth Works\nThe Old Dairy, Fernhollow\naccounts@fernhollow.example',
    FERNHOLLOW,
    password,
  );
  const parts = await makeShelf(fernhollow.id, fernhollow.people);
  console.log(`${parts.size} parts on the shelf`);
  const suppliers = await makeSuppliers(fernhollow.people);
  const offers = await makeOffers(fernhollow.people, suppliers, parts);
  console.log(`${offers.size} offers of three suppliers`);
  const revisions = await makeCircuits(fernhollow.id, fernhollow.people);
  console.log(`${revisions.size} revisions read`);
  const settled = ['Wave Folder 1.0', 'State-Variable Filter A', 'Slope Pair C'].flatMap(
    (name) => revisions.get(name) ?? [],
  );
  await decideUsual(fernhollow.id, fernhollow.people, settled);
  await makeBatches(fernhollow.id, fernhollow.people, revisions);
  await makeOrders(fernhollow.id, fernhollow.people, suppliers, offers);

  // E. Wisket works in both, so that the change of workshop can be tried.
  const both = fernhollow.ids.get('both@fernhollow.example') ?? '';
  const larkspur = await makeWorkshop('Larkspur Modular Bench', 'Larkspur Modular Bench', LARKSPUR, password, [
    { personId: both, roles: ['builder'] },
  ]);
  await makeShelf(larkspur.id, larkspur.people);

  const file = process.env.SIGN_INS_FILE ?? '.data/sign-ins.txt';
  mkdirSync(path.dirname(file), { recursive: true });
  const rows = [
    ...FERNHOLLOW.map((one) => ['Fernhollow Synth Works', one] as const),
    ...LARKSPUR.map((one) => ['Larkspur Modular Bench', one] as const),
  ];
  writeFileSync(
    file,
    `${rows.map(([where, one]) => `${one.roles.join('+').padEnd(20)} ${one.email.padEnd(32)} ${password}   ${where}`).join('\n')}\n`,
    { mode: 0o600 },
  );
}

try {
  await main();
} catch (error) {
  console.error(error instanceof Error ? (error.stack ?? error.message) : String(error));
  process.exitCode = 1;
} finally {
  await closeDatabase();
}

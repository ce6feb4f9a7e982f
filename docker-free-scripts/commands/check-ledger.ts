/** Proves the ledger's invariants on the database of DATABASE_URL, workshop by workshop: npm run check:ledger. Exit 1 where one is broken. */
import './load-environment';
import { closeDatabase, withScope, withWorkshop } from '@/db/client';
import { workshop } from '@/db/schema/people';
import { checkLedger } from '@/lib/stores/check-ledger';

let broken = 0;
try {
  const workshops = await withScope('auth', (tx) => tx.select({ id: workshop.id, name: workshop.name }).from(workshop));
  for (const { id, name } of workshops) {
    console.log(name);
    for (const report of await withWorkshop(id, (tx) => checkLedger(tx, id), { readOnly: true })) {
      console.log(
        `  ${report.broken.length === 0 ? 'holds ' : 'BROKEN'} ${report.number}. ${report.says} (${report.checked} checked)`,
      );
      for (const row of report.broken) console.log(`         ${row}`);
      broken += report.broken.length;
    }
  }
  console.log(broken === 0 ? `the ledger holds in ${workshops.length} workshops` : `${broken} rows break it`);
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  broken += 1;
} finally {
  await closeDatabase();
}
process.exitCode = broken === 0 ? 0 : 1;

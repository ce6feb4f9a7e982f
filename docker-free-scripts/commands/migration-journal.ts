/**
 * The committed migrations beside what a database has had. drizzle-orm silently skips a migration whose journal time is
 * older than the last applied one (as after a merge), so that is refused here in words.
 */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';

export const MIGRATIONS_FOLDER = fileURLToPath(new URL('../../drizzle', import.meta.url));

const journalFile = z.object({ entries: z.array(z.object({ tag: z.string(), when: z.number() })) });

export interface Migration {
  readonly tag: string;
  /** The journal's time in milliseconds since 1970; drizzle-orm orders and recognises migrations by it. */
  readonly when: number;
  readonly hash: string;
}

export interface AppliedMigration {
  readonly when: number;
  readonly hash: string;
}

/** @throws where the journal names a file that isn't there. */
export function readJournal(folder = MIGRATIONS_FOLDER): Migration[] {
  const journal = journalFile.parse(JSON.parse(readFileSync(`${folder}/meta/_journal.json`, 'utf8')));
  return journal.entries.map(({ tag, when }) => ({
    tag,
    when,
    hash: createHash('sha256')
      .update(readFileSync(`${folder}/${tag}.sql`, 'utf8'))
      .digest('hex'),
  }));
}

/** Why the migrations can't be applied as they stand, or null. */
export function journalProblem(journal: readonly Migration[], applied: readonly AppliedMigration[]): string | null {
  for (const [index, entry] of journal.entries()) {
    const before = journal[index - 1];
    if (before && entry.when <= before.when)
      return `drizzle/meta/_journal.json: ${entry.tag} has an older "when" than ${before.tag}; generate it again (npm run db:generate).`;
  }
  const appliedByTime = new Map(applied.map((migration) => [migration.when, migration]));
  const newestApplied = Math.max(0, ...appliedByTime.keys());
  const known = new Set(journal.map((entry) => entry.when));
  const unknown = applied.find((migration) => !known.has(migration.when));
  if (unknown) {
    const time = new Date(unknown.when).toISOString();
    return `the database has had a migration (of ${time}) that this checkout doesn't know: update the checkout, or, where the data may go, run docker-free-scripts/db.sh destroy --yes.`;
  }
  for (const entry of journal) {
    const done = appliedByTime.get(entry.when);
    if (done && done.hash !== entry.hash)
      return `drizzle/${entry.tag}.sql was changed after this database had it: write a new migration instead, or, where the data may go, run docker-free-scripts/db.sh destroy --yes.`;
    if (!done && entry.when < newestApplied)
      return `drizzle/${entry.tag}.sql is older than the last migration that the database has had and would be skipped: generate it again (npm run db:generate).`;
  }
  return null;
}

/**
 * Checks that drizzle/ holds every change of db/schema: the journal is in order, each entry has its file and each file its
 * entry, and generating again would write nothing. Needs no database. Exit status 1 with the reason when not.
 */
import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { journalProblem, MIGRATIONS_FOLDER, readJournal } from './migration-journal';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const GENERATE_LIMIT_MS = 90_000;

const sqlFiles = (folder: string) => readdirSync(folder).filter((name) => name.endsWith('.sql'));

function findProblem(): string | null {
  const journal = readJournal();
  if (journal.length === 0) return 'drizzle/ has no migrations';
  const outOfOrder = journalProblem(journal, []);
  if (outOfOrder) return outOfOrder;
  const named = new Set(journal.map((entry) => `${entry.tag}.sql`));
  const stray = sqlFiles(MIGRATIONS_FOLDER).find((name) => !named.has(name));
  if (stray) return `drizzle/${stray} is not in the journal, so no database will get it`;

  mkdirSync(`${ROOT}/.data`, { recursive: true });
  const copy = mkdtempSync(`${ROOT}/.data/drizzle-`);
  try {
    cpSync(MIGRATIONS_FOLDER, copy, { recursive: true });
    const generate = spawnSync(
      process.execPath,
      [
        'node_modules/drizzle-kit/bin.cjs',
        'generate',
        '--dialect',
        'postgresql',
        '--schema',
        './db/schema/*.ts',
        '--out',
        relative(ROOT, copy),
      ],
      { cwd: ROOT, encoding: 'utf8', timeout: GENERATE_LIMIT_MS, input: '' },
    );
    const said = `${generate.stdout}${generate.stderr}`;
    const extra = sqlFiles(copy).filter((name) => !named.has(name));
    if (extra.length > 0)
      return `db/schema has changes that drizzle/ lacks: run npm run db:generate and commit it (${extra.join(', ')})`;
    // drizzle-kit asks when a change could be a renaming, and without a terminal it gives up with any exit status.
    if (generate.status !== 0 || !said.includes('No schema changes'))
      return `drizzle-kit generate did not say that nothing changed:\n${said.slice(-1500)}`;
  } finally {
    rmSync(copy, { recursive: true, force: true });
  }
  return null;
}

const problem = findProblem();
if (problem) {
  console.error(problem);
  process.exitCode = 1;
} else {
  console.log(`${readJournal().length} migrations, in order and complete`);
}

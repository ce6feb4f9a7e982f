// Migrations are never skipped or changed in silence: drizzle-orm 0.45 passes over an entry whose time is older than the
// last applied one (seen in its dialect.migrate), which after a merge would leave a database without a table.
import { describe, expect, it } from 'vitest';
import { journalProblem, readJournal } from '@/docker-free-scripts/commands/migration-journal';

const tables = { tag: '0001_tables', when: 2_000, hash: 'b' };
const rights = { tag: '0002_rights', when: 3_000, hash: 'c' };
const journal = [{ tag: '0000_role', when: 1_000, hash: 'a' }, tables, rights];
const applied = journal.map(({ when, hash }) => ({ when, hash }));

describe('migrations', () => {
  it('go ahead on an empty database, on one that lacks the newest, and on one that has all', () => {
    expect(journalProblem(journal, [])).toBeNull();
    expect(journalProblem(journal, applied.slice(0, 2))).toBeNull();
    expect(journalProblem(journal, applied)).toBeNull();
  });

  it('are refused when one would be skipped because a younger one is applied already', () => {
    expect(
      journalProblem(
        journal,
        [applied[0], applied[2]].filter((one) => one !== undefined),
      ),
    ).toContain('0001_tables.sql is older');
  });

  it('are refused when the journal itself is out of order, as after a merge', () => {
    expect(journalProblem([...journal, { tag: '0003_merged', when: 2_500, hash: 'd' }], [])).toContain(
      '0003_merged has an older',
    );
  });

  it('are refused when one was edited after the database had it', () => {
    expect(journalProblem([...journal.slice(0, 2), { ...rights, hash: 'edited' }], applied)).toContain(
      '0002_rights.sql was changed',
    );
  });

  it('are refused on a database that a newer checkout has migrated', () => {
    expect(journalProblem(journal.slice(0, 2), applied)).toContain("this checkout doesn't know");
  });

  it('that are committed are in order', () => {
    const committed = readJournal();
    expect(committed.length).toBeGreaterThan(0);
    expect(journalProblem(committed, [])).toBeNull();
  });
});

import { copyFileSync, existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

import Database from 'better-sqlite3';
import { drizzle } from 'drizzle-orm/better-sqlite3';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';

export const MIGRATIONS_FOLDER = fileURLToPath(new URL('./migrations', import.meta.url));

interface JournalEntry {
  tag: string;
  when: number;
}

function journalEntries(folder: string): JournalEntry[] {
  return JSON.parse(readFileSync(join(folder, 'meta', '_journal.json'), 'utf8')).entries;
}

function lastAppliedWhen(sqlite: Database.Database): number | null {
  const known = sqlite.prepare(`select 1 from sqlite_master where name = '__drizzle_migrations'`).get();
  if (!known) return null;
  const row = sqlite.prepare('select max(created_at) as newest from __drizzle_migrations').get();
  return (row as { newest: number | null }).newest;
}

/** The name of the newest migration that the file has, or null for an empty file. */
export function appliedMigration(sqlite: Database.Database, folder = MIGRATIONS_FOLDER): string | null {
  const newest = lastAppliedWhen(sqlite);
  return journalEntries(folder).find((entry) => entry.when === newest)?.tag ?? null;
}

/**
 * The only way a database changes its shape.
 *
 * SQLite cannot alter most things in place, so the generated migrations rebuild tables; with foreign keys
 * on, dropping the old table silently deletes every child row that cascades, and `foreign_keys` cannot be
 * switched off inside the transaction a migration runs in. Hence: copy aside, keys off, migrate, check, on.
 * Returns the path of the copy, or null where none was needed.
 */
export function migrateDatabase(file: string, folder = MIGRATIONS_FOLDER): string | null {
  const entries = journalEntries(folder);
  const sqlite = new Database(file);
  let copy: string | null = null;
  try {
    const applied = lastAppliedWhen(sqlite);
    const newestKnown = entries.at(-1)?.when ?? 0;
    if (applied !== null && applied > newestKnown) {
      throw new Error(`${file} was written by a newer version of this program; it is left untouched.`);
    }
    const pending = entries.filter((entry) => applied === null || entry.when > applied);
    if (pending.length === 0) return null;
    if (applied !== null) copy = setAside(sqlite, file, pending[0]!.tag);

    sqlite.pragma('foreign_keys = OFF');
    migrate(drizzle(sqlite), { migrationsFolder: folder });
    const broken = sqlite.pragma('foreign_key_check') as unknown[];
    if (broken.length > 0) throw new Error(`a migration left ${broken.length} rows without their parent row`);
    sqlite.pragma('foreign_keys = ON');
  } catch (error) {
    sqlite.close();
    if (copy) putBack(copy, file);
    throw error;
  }
  sqlite.close();
  return copy;
}

function setAside(sqlite: Database.Database, file: string, tag: string): string {
  const copy = `${file}.before-${tag}`;
  if (existsSync(copy)) rmSync(copy);
  sqlite.prepare('vacuum into ?').run(copy);
  return copy;
}

function putBack(copy: string, file: string): void {
  for (const suffix of ['-wal', '-shm']) rmSync(`${file}${suffix}`, { force: true });
  copyFileSync(copy, file);
}

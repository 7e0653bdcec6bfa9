import type { RunResult } from 'better-sqlite3';
import Database from 'better-sqlite3';
import { drizzle } from 'drizzle-orm/better-sqlite3';
import type { BaseSQLiteDatabase } from 'drizzle-orm/sqlite-core';

import { schema } from './schema/all';

/** A connection or a transaction in it: store functions take either. */
export type Db = BaseSQLiteDatabase<'sync', RunResult, typeof schema>;

export interface DatabaseHandle {
  db: Db;
  sqlite: Database.Database;
  close(): void;
}

export function openDatabase(file: string): DatabaseHandle {
  const sqlite = new Database(file);
  sqlite.pragma('journal_mode = WAL');
  // FULL: a plan that was answered with 202 is still there after a power cut.
  sqlite.pragma('synchronous = FULL');
  sqlite.pragma('busy_timeout = 5000');
  sqlite.pragma('foreign_keys = ON');
  const db = drizzle(sqlite, { schema });
  return { db, sqlite, close: () => sqlite.close() };
}

import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';

import { id } from './columns';

/**
 * People and what the sign-in library keeps about them. Property names are the ones that library
 * expects, which is why its moments are Dates here; they are UTC milliseconds in the file all the same.
 */
const moment = (name: string) => integer(name, { mode: 'timestamp_ms' });

export const people = sqliteTable('people', {
  id: id().primaryKey(),
  name: text('name').notNull(),
  email: text('email').notNull().unique(),
  emailVerified: integer('email_verified', { mode: 'boolean' }).notNull().default(false),
  image: text('image'),
  /** A demonstration account: its password is public, so production refuses to start beside one. */
  isDemo: integer('is_demo', { mode: 'boolean' }).notNull().default(false),
  createdAt: moment('created_at').notNull(),
  updatedAt: moment('updated_at').notNull(),
});

export const sessions = sqliteTable(
  'sessions',
  {
    id: id().primaryKey(),
    expiresAt: moment('expires_at').notNull(),
    token: text('token').notNull().unique(),
    ipAddress: text('ip_address'),
    userAgent: text('user_agent'),
    userId: text('user_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    createdAt: moment('created_at').notNull(),
    updatedAt: moment('updated_at').notNull(),
  },
  (table) => [index('sessions_user').on(table.userId)],
);

export const accounts = sqliteTable(
  'accounts',
  {
    id: id().primaryKey(),
    accountId: text('account_id').notNull(),
    providerId: text('provider_id').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    accessToken: text('access_token'),
    refreshToken: text('refresh_token'),
    idToken: text('id_token'),
    accessTokenExpiresAt: moment('access_token_expires_at'),
    refreshTokenExpiresAt: moment('refresh_token_expires_at'),
    scope: text('scope'),
    /** A salted hash, never the password. */
    password: text('password'),
    createdAt: moment('created_at').notNull(),
    updatedAt: moment('updated_at').notNull(),
  },
  (table) => [index('accounts_user').on(table.userId)],
);

export const verifications = sqliteTable(
  'verifications',
  {
    id: id().primaryKey(),
    identifier: text('identifier').notNull(),
    value: text('value').notNull(),
    expiresAt: moment('expires_at').notNull(),
    createdAt: moment('created_at').notNull(),
    updatedAt: moment('updated_at').notNull(),
  },
  (table) => [index('verifications_identifier').on(table.identifier)],
);

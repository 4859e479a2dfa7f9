import { sql } from 'drizzle-orm'
import { bigint, boolean, char, check, date, foreignKey, index, pgEnum, pgPolicy, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { ROLES } from '../../../shared/abilities'
import { breweries } from './breweries'
import { breweryId, breweryRows, instant, openPerson, version } from './columns'

/** People sign in once and may be in the crew of several breweries, so they belong to none. */
export const users = pgTable('users', {
  id: uuid().primaryKey(),
  email: text().notNull(),
  name: text().notNull(),
  passwordHash: text().notNull(),
  createdAt: instant().notNull(),
  version: version(),
}, table => [
  uniqueIndex('users_email_key').on(table.email),
  check('users_email_lower', sql`${table.email} = lower(${table.email})`),
])

export const role = pgEnum('role', ROLES)

/** Who is in the crew of which brewery. Ended, never deleted: what a person did stays theirs. */
export const memberships = pgTable('memberships', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  userId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
  role: role().notNull(),
  /** The last day on which the person may sign in here. */
  accessUntil: date({ mode: 'string' }),
  endedAt: instant(),
  version: version(),
}, table => [
  primaryKey({ name: 'memberships_pkey', columns: [table.breweryId, table.userId] }),
  index('memberships_user_idx').on(table.userId),
  breweryRows(table.breweryId),
  pgPolicy('own_memberships', { as: 'permissive', for: 'select', using: sql`${table.userId} = ${openPerson}` }),
])

/** A signed-in browser. The cookie holds a random token, this row its hash: gone here is signed out there. */
export const sessions = pgTable('sessions', {
  tokenHash: char({ length: 64 }).primaryKey(),
  userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
  /** Null while a person of several breweries has not chosen. */
  breweryId: uuid(),
  createdAt: instant().notNull(),
  lastSeenAt: instant().notNull(),
  expiresAt: instant().notNull(),
}, table => [
  foreignKey({ name: 'sessions_membership_fkey', columns: [table.breweryId, table.userId], foreignColumns: [memberships.breweryId, memberships.userId] }).onDelete('cascade'),
  index('sessions_user_idx').on(table.userId),
  index('sessions_expires_idx').on(table.expiresAt),
])

export const tokenKind = pgEnum('token_kind', ['setUp'])

/** Secrets that open a door once: only their hash is kept. */
export const tokens = pgTable('tokens', {
  id: uuid().primaryKey(),
  kind: tokenKind().notNull(),
  hash: char({ length: 64 }).notNull(),
  createdAt: instant().notNull(),
  expiresAt: instant().notNull(),
  usedAt: instant(),
}, table => [uniqueIndex('tokens_hash_key').on(table.hash)])

export const attemptKind = pgEnum('attempt_kind', ['signIn', 'setUp'])

/** What throttling counts. Account and address are kept as keyed hashes: enough to count, not enough to read. */
export const signInAttempts = pgTable('sign_in_attempts', {
  id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
  kind: attemptKind().notNull(),
  accountHash: char({ length: 64 }).notNull(),
  addressHash: char({ length: 64 }).notNull(),
  succeeded: boolean().notNull(),
  at: instant().notNull(),
}, table => [
  index('sign_in_attempts_address_idx').on(table.addressHash, table.at),
  index('sign_in_attempts_account_idx').on(table.accountHash, table.at),
  index('sign_in_attempts_at_idx').on(table.at),
])

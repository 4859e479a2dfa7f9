import { sql } from 'drizzle-orm'
import type { AnyPgColumn } from 'drizzle-orm/pg-core'
import { integer, pgPolicy, timestamp, uuid } from 'drizzle-orm/pg-core'

/** An instant. The application's clock says it, never the database's. */
export const instant = () => timestamp({ withTimezone: true, mode: 'date' })

/** Counts the changes of a row that people edit, so that a stale writer is told instead of heard. */
export const version = () => integer().notNull().default(1)

/** The brewery a row belongs to: first in the primary key, and in every unique and foreign key, of each tenant table. */
export const breweryId = () => uuid().notNull()

/** The brewery that the open transaction works for; null outside `withBrewery()`, so that then no row is seen. */
export const openBrewery = sql`nullif(current_setting('undercroft.brewery', true), '')::uuid`

/** The person that the open transaction works for. */
export const openPerson = sql`nullif(current_setting('undercroft.person', true), '')::uuid`

/** The policy of every tenant table: only rows of the open brewery are seen, and only such are written. */
export function breweryRows(column: AnyPgColumn) {
  return pgPolicy('brewery_rows', {
    as: 'permissive',
    for: 'all',
    using: sql`${column} = ${openBrewery}`,
    withCheck: sql`${column} = ${openBrewery}`,
  })
}

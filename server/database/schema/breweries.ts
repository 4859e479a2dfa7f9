import { sql } from 'drizzle-orm'
import { check, date, pgTable, primaryKey, text, time, uuid } from 'drizzle-orm/pg-core'
import { breweryId, breweryRows, instant, version } from './columns'

export const breweries = pgTable('breweries', {
  id: uuid().primaryKey(),
  name: text().notNull(),
  timeZone: text().notNull(),
  /** When the morning's mail goes out, by the brewery's own clock. */
  sendAt: time().notNull().default('06:30'),
  createdAt: instant().notNull(),
  version: version(),
})

/** Days on which nobody works: by a rule of RFC 5545, or a span that comes every year. */
export const closedDays = pgTable('closed_days', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  rule: text(),
  /** `MM-DD`, both ends in; a span may run over New Year. */
  fromMonthDay: text(),
  toMonthDay: text(),
  since: date({ mode: 'string' }),
  version: version(),
}, table => [
  primaryKey({ name: 'closed_days_pkey', columns: [table.breweryId, table.id] }),
  check('closed_days_one_shape', sql`(${table.rule} is null) <> (${table.fromMonthDay} is null) and (${table.fromMonthDay} is null) = (${table.toMonthDay} is null)`),
  check('closed_days_month_days', sql`${table.fromMonthDay} ~ '^(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$' and ${table.toMonthDay} ~ '^(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$'`),
  breweryRows(table.breweryId),
])

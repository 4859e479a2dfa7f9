import { index, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { breweries } from './breweries'
import { breweryId, breweryRows, instant } from './columns'
import { users } from './people'

/** Who did what, when. Only ever added to: the database refuses every change of a row. */
export const auditEvents = pgTable('audit_events', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  at: instant().notNull(),
  personId: uuid().references(() => users.id, { onDelete: 'restrict' }),
  action: text().notNull(),
  subjectKind: text(),
  subjectId: uuid(),
  detail: jsonb().$type<Record<string, unknown>>(),
}, table => [
  primaryKey({ name: 'audit_events_pkey', columns: [table.breweryId, table.id] }),
  index('audit_events_at_idx').on(table.breweryId, table.at),
  breweryRows(table.breweryId),
])

import { sql } from 'drizzle-orm'
import { boolean, check, foreignKey, index, integer, numeric, pgEnum, pgTable, primaryKey, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { VESSEL_KINDS } from '../../../shared/cellar/vessel'
import { breweries } from './breweries'
import { breweryId, breweryRows, instant, version } from './columns'

export const beers = pgTable('beers', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  code: text().notNull(),
  name: text().notNull(),
  family: text().notNull(),
  version: version(),
}, table => [
  primaryKey({ name: 'beers_pkey', columns: [table.breweryId, table.id] }),
  unique('beers_code_key').on(table.breweryId, table.code),
  breweryRows(table.breweryId),
])

export const vesselKind = pgEnum('vessel_kind', VESSEL_KINDS)

export const vessels = pgTable('vessels', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  name: text().notNull(),
  kind: vesselKind().notNull(),
  workingLitres: numeric({ precision: 12, scale: 3, mode: 'number' }).notNull(),
  wood: boolean().notNull(),
  walkingOrder: integer().notNull(),
  beerId: uuid(),
  createdAt: instant().notNull(),
  version: version(),
}, table => [
  primaryKey({ name: 'vessels_pkey', columns: [table.breweryId, table.id] }),
  uniqueIndex('vessels_name_key').on(table.breweryId, sql`lower(${table.name})`),
  foreignKey({ name: 'vessels_beer_fkey', columns: [table.breweryId, table.beerId], foreignColumns: [beers.breweryId, beers.id] }).onDelete('restrict'),
  index('vessels_walk_idx').on(table.breweryId, table.walkingOrder, table.name),
  check('vessels_litres_positive', sql`${table.workingLitres} > 0`),
  check('vessels_order_positive', sql`${table.walkingOrder} > 0`),
  check('vessels_name_not_blank', sql`length(btrim(${table.name})) > 0`),
  breweryRows(table.breweryId),
])

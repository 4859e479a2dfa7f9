import { sql } from 'drizzle-orm'
import { check, date, foreignKey, index, integer, numeric, pgEnum, pgTable, primaryKey, smallint, text, unique, uuid } from 'drizzle-orm/pg-core'
import { LOSS_REASONS, METHOD_NAMES, MOVEMENT_KINDS } from '../../../shared/cellar/movement'
import { VESSEL_EVENT_KINDS } from '../../../shared/cellar/vesselEvent'
import { breweries } from './breweries'
import { beers, vessels } from './cellar'
import { breweryId, breweryRows, instant, version } from './columns'
import { users } from './people'

const litresColumn = () => numeric({ precision: 12, scale: 3, mode: 'number' })

/** A batch that was brewed. Its code is the brewery's own and names one brew day. */
export const brews = pgTable('brews', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  code: text().notNull(),
  brewedOn: date({ mode: 'string' }).notNull(),
  /** The brew day is known to so many days only, either way. */
  ageBandDays: integer(),
  beerId: uuid(),
  createdAt: instant().notNull(),
  version: version(),
}, table => [
  primaryKey({ name: 'brews_pkey', columns: [table.breweryId, table.id] }),
  unique('brews_code_key').on(table.breweryId, table.code),
  foreignKey({ name: 'brews_beer_fkey', columns: [table.breweryId, table.beerId], foreignColumns: [beers.breweryId, beers.id] }).onDelete('restrict'),
  check('brews_age_band_positive', sql`${table.ageBandDays} > 0`),
  breweryRows(table.breweryId),
])

/** Movements that belong together: all or none. Only ever added to. */
export const acts = pgTable('acts', {
  breweryId: breweryId().references(() => breweries.id, { onDelete: 'restrict' }),
  id: uuid().notNull(),
  note: text(),
  recordedAt: instant().notNull(),
  recordedBy: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
}, table => [
  primaryKey({ name: 'acts_pkey', columns: [table.breweryId, table.id] }),
  breweryRows(table.breweryId),
])

export const movementKind = pgEnum('movement_kind', MOVEMENT_KINDS)
export const lossReason = pgEnum('loss_reason', LOSS_REASONS)
export const measuringMethod = pgEnum('measuring_method', METHOD_NAMES)

/** One line of the ledger. Only ever added to; a wrong one is struck out by a reversal. */
export const movements = pgTable('movements', {
  breweryId: breweryId(),
  id: uuid().notNull(),
  actId: uuid().notNull(),
  position: integer().notNull(),
  kind: movementKind().notNull(),
  vesselId: uuid().notNull(),
  litres: litresColumn().notNull(),
  occurredOn: date({ mode: 'string' }).notNull(),
  placeInDay: smallint().notNull(),
  method: measuringMethod(),
  note: text(),
  /** Of an `in`. */
  brewId: uuid(),
  /** Of a draw: the lot or run that it goes to. */
  lot: text(),
  /** Of a move. */
  toVesselId: uuid(),
  lossLitres: litresColumn(),
  /** Of a loss. */
  reason: lossReason(),
}, table => [
  primaryKey({ name: 'movements_pkey', columns: [table.breweryId, table.id] }),
  unique('movements_place_key').on(table.breweryId, table.actId, table.position),
  foreignKey({ name: 'movements_act_fkey', columns: [table.breweryId, table.actId], foreignColumns: [acts.breweryId, acts.id] }).onDelete('restrict'),
  foreignKey({ name: 'movements_vessel_fkey', columns: [table.breweryId, table.vesselId], foreignColumns: [vessels.breweryId, vessels.id] }).onDelete('restrict'),
  foreignKey({ name: 'movements_to_vessel_fkey', columns: [table.breweryId, table.toVesselId], foreignColumns: [vessels.breweryId, vessels.id] }).onDelete('restrict'),
  foreignKey({ name: 'movements_brew_fkey', columns: [table.breweryId, table.brewId], foreignColumns: [brews.breweryId, brews.id] }).onDelete('restrict'),
  index('movements_vessel_idx').on(table.breweryId, table.vesselId, table.occurredOn),
  index('movements_to_vessel_idx').on(table.breweryId, table.toVesselId),
  index('movements_brew_idx').on(table.breweryId, table.brewId),
  check('movements_litres_positive', sql`${table.litres} > 0`),
  check('movements_brew_of_in', sql`(${table.kind} = 'in') = (${table.brewId} is not null)`),
  check('movements_lot_of_draw', sql`${table.kind} = 'draw' or ${table.lot} is null`),
  check('movements_reason_of_loss', sql`(${table.kind} = 'loss') = (${table.reason} is not null)`),
  check('movements_target_of_move', sql`(${table.kind} = 'move') = (${table.toVesselId} is not null) and (${table.kind} = 'move' or ${table.lossLitres} is null)`),
  check('movements_not_into_itself', sql`${table.toVesselId} <> ${table.vesselId}`),
  check('movements_loss_of_move', sql`${table.lossLitres} >= 0 and ${table.lossLitres} <= ${table.litres}`),
  breweryRows(table.breweryId),
])

/** Strikes one movement out: from then on, on every date, it is as if it had never been. */
export const reversals = pgTable('reversals', {
  breweryId: breweryId(),
  id: uuid().notNull(),
  movementId: uuid().notNull(),
  /** The id that the sender made; reversals of one act share it. */
  requestId: uuid().notNull(),
  reason: text().notNull(),
  reversedAt: instant().notNull(),
  reversedBy: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
}, table => [
  primaryKey({ name: 'reversals_pkey', columns: [table.breweryId, table.id] }),
  unique('reversals_movement_key').on(table.breweryId, table.movementId),
  foreignKey({ name: 'reversals_movement_fkey', columns: [table.breweryId, table.movementId], foreignColumns: [movements.breweryId, movements.id] }).onDelete('restrict'),
  index('reversals_request_idx').on(table.breweryId, table.requestId),
  breweryRows(table.breweryId),
])

/** A remark in the ledger of a vessel. It moves nothing. */
export const ledgerNotes = pgTable('ledger_notes', {
  breweryId: breweryId(),
  id: uuid().notNull(),
  actId: uuid().notNull(),
  position: integer().notNull(),
  vesselId: uuid().notNull(),
  notedOn: date({ mode: 'string' }).notNull(),
  text: text().notNull(),
}, table => [
  primaryKey({ name: 'ledger_notes_pkey', columns: [table.breweryId, table.id] }),
  foreignKey({ name: 'ledger_notes_act_fkey', columns: [table.breweryId, table.actId], foreignColumns: [acts.breweryId, acts.id] }).onDelete('restrict'),
  foreignKey({ name: 'ledger_notes_vessel_fkey', columns: [table.breweryId, table.vesselId], foreignColumns: [vessels.breweryId, vessels.id] }).onDelete('restrict'),
  index('ledger_notes_vessel_idx').on(table.breweryId, table.vesselId),
  breweryRows(table.breweryId),
])

export const vesselEventKind = pgEnum('vessel_event_kind', VESSEL_EVENT_KINDS)

/** What befell a vessel besides its beer. Its standing is read off these. Only ever added to. */
export const vesselEvents = pgTable('vessel_events', {
  breweryId: breweryId(),
  id: uuid().notNull(),
  vesselId: uuid().notNull(),
  kind: vesselEventKind().notNull(),
  occurredOn: date({ mode: 'string' }).notNull(),
  reason: text(),
  /** Of a resize. */
  fromLitres: litresColumn(),
  toLitres: litresColumn(),
  recordedAt: instant().notNull(),
  recordedBy: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
}, table => [
  primaryKey({ name: 'vessel_events_pkey', columns: [table.breweryId, table.id] }),
  foreignKey({ name: 'vessel_events_vessel_fkey', columns: [table.breweryId, table.vesselId], foreignColumns: [vessels.breweryId, vessels.id] }).onDelete('restrict'),
  index('vessel_events_vessel_idx').on(table.breweryId, table.vesselId, table.occurredOn),
  check('vessel_events_resize', sql`(${table.kind} = 'resized') = (${table.fromLitres} is not null and ${table.toLitres} is not null)`),
  breweryRows(table.breweryId),
])

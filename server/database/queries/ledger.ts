import { and, asc, eq, sql } from 'drizzle-orm'
import { isMovementKind, type LedgerLine } from '#shared/cellar/movement'
import { anyOf } from '../anyOf'
import type { Tx } from '../client'
import { acts, beers, ledgerNotes, movements, reversals, users } from '../schema'

export type MovementRow = typeof movements.$inferSelect
export type ActRow = typeof acts.$inferSelect
export type ReversalRow = typeof reversals.$inferSelect

// The whole ledger in one text, a line of ten fields a movement: read row by row, it takes several times as long as its
// replay. No field can hold a comma. What is struck out is looked up in a hash, whatever the planner thinks of its number. The order is the ledger's own: ids of 128 bits sort as their text does.
const STANDING_LINES = `
  select string_agg(
    m.kind::text || ',' || (m.occurred_on - date '1970-01-01') || ',' || m.place_in_day || ',' || m.act_id || ',' || m.position || ',' || m.vessel_id
      || ',' || m.litres || ',' || coalesce(m.brew_id::text, '') || ',' || coalesce(m.to_vessel_id::text, '') || ',' || coalesce(m.loss_litres::text, ''),
    E'\\n' order by m.occurred_on, m.place_in_day, m.act_id, m.position
  ) as lines
  from movements m
  where m.brewery_id = $1 and m.id not in (select r.movement_id from reversals r where r.brewery_id = $1)`

/** Every line of a brewery's ledger that has not been struck out, in ledger order. */
export async function linesInLedgerOrder(tx: Tx, breweryId: string): Promise<LedgerLine[]> {
  const { rows: [row] } = await tx.$client.query<{ lines: string | null }>({ name: 'standing_lines', text: STANDING_LINES, values: [breweryId] })
  return row?.lines ? row.lines.split('\n').map(lineOf) : []
}

function lineOf(text: string): LedgerLine {
  const [kind = '', day, placeInDay, actId = '', position, vesselId = '', litres, brewId, toVesselId, lossLitres] = text.split(',')
  if (!isMovementKind(kind)) throw new Error('a line of the ledger is of a kind that is none')
  const line: LedgerLine = { kind, day: Number(day), placeInDay: Number(placeInDay), actId, position: Number(position), vesselId, litres: Number(litres) }
  if (brewId) line.brewId = brewId
  if (toVesselId) {
    line.toVesselId = toVesselId
    line.lossLitres = Number(lossLitres)
  }
  return line
}

export interface BrewRow {
  id: string
  code: string
  brewedOn: string
  brewedDay: number
  ageBandDays: number | null
  beerId: string | null
  beerCode: string | null
  beerName: string | null
  version: number
}

const BREWS = `
  select w.id, w.code, w.brewed_on::text as "brewedOn", w.brewed_on - date '1970-01-01' as "brewedDay", w.age_band_days as "ageBandDays",
    w.beer_id as "beerId", e.code as "beerCode", e.name as "beerName", w.version
  from brews w left join beers e on e.brewery_id = w.brewery_id and e.id = w.beer_id
  where w.brewery_id = $1 order by w.brewed_on, w.code`

/** All brews of a brewery, oldest first, each with its beer. */
export async function brewsOldestFirst(tx: Tx, breweryId: string): Promise<BrewRow[]> {
  const { rows } = await tx.$client.query<BrewRow>({ name: 'brews_with_beer', text: BREWS, values: [breweryId] })
  return rows
}

/** An act with its movements in their order, or undefined if the brewery has none of that id. */
export async function actById(tx: Tx, breweryId: string, id: string): Promise<{ act: ActRow & { recordedByName: string }, movements: MovementRow[] } | undefined> {
  const [act] = await tx.select({ act: acts, recordedByName: users.name }).from(acts)
    .innerJoin(users, eq(users.id, acts.recordedBy))
    .where(and(eq(acts.breweryId, breweryId), eq(acts.id, id)))
  if (!act) return undefined
  const rows = await tx.select().from(movements).where(and(eq(movements.breweryId, breweryId), eq(movements.actId, id))).orderBy(asc(movements.position))
  return { act: { ...act.act, recordedByName: act.recordedByName }, movements: rows }
}

export async function movementById(tx: Tx, breweryId: string, id: string): Promise<MovementRow | undefined> {
  const [row] = await tx.select().from(movements).where(and(eq(movements.breweryId, breweryId), eq(movements.id, id)))
  return row
}

export type ReversalWithName = ReversalRow & { reversedByName: string }

/** The reversals of some movements, told who made each. */
export async function reversalsOf(tx: Tx, breweryId: string, movementIds: string[]): Promise<ReversalWithName[]> {
  if (movementIds.length === 0) return []
  const rows = await tx.select({ reversal: reversals, name: users.name }).from(reversals)
    .innerJoin(users, eq(users.id, reversals.reversedBy))
    .where(and(eq(reversals.breweryId, breweryId), anyOf(reversals.movementId, movementIds)))
  return rows.map(({ reversal, name }) => ({ ...reversal, reversedByName: name }))
}

/** What one request struck out. */
export async function reversalsByRequest(tx: Tx, breweryId: string, requestId: string): Promise<ReversalWithName[]> {
  const rows = await tx.select({ reversal: reversals, name: users.name }).from(reversals)
    .innerJoin(users, eq(users.id, reversals.reversedBy))
    .where(and(eq(reversals.breweryId, breweryId), eq(reversals.requestId, requestId)))
    .orderBy(asc(reversals.id))
  return rows.map(({ reversal, name }) => ({ ...reversal, reversedByName: name }))
}

/** The lines that touch a vessel, newest first. */
export function movementsOfVessel(tx: Tx, breweryId: string, vesselId: string): Promise<MovementRow[]> {
  return tx.select().from(movements)
    .where(and(eq(movements.breweryId, breweryId), sql`(${movements.vesselId} = ${vesselId} or ${movements.toVesselId} = ${vesselId})`))
    .orderBy(sql`${movements.occurredOn} desc, ${movements.placeInDay} desc, ${movements.actId} desc, ${movements.position} desc`)
}

/** The notes of a vessel, newest first. */
export function notesOfVessel(tx: Tx, breweryId: string, vesselId: string): Promise<{ id: string, notedOn: string, text: string }[]> {
  return tx.select({ id: ledgerNotes.id, notedOn: ledgerNotes.notedOn, text: ledgerNotes.text }).from(ledgerNotes)
    .where(and(eq(ledgerNotes.breweryId, breweryId), eq(ledgerNotes.vesselId, vesselId)))
    .orderBy(sql`${ledgerNotes.notedOn} desc, ${ledgerNotes.position} desc`)
}

/** Acts by their ids, told who recorded each. */
export async function actsByIds(tx: Tx, breweryId: string, ids: string[]): Promise<(ActRow & { recordedByName: string })[]> {
  if (ids.length === 0) return []
  const rows = await tx.select({ act: acts, name: users.name }).from(acts)
    .innerJoin(users, eq(users.id, acts.recordedBy))
    .where(and(eq(acts.breweryId, breweryId), anyOf(acts.id, ids)))
  return rows.map(({ act, name }) => ({ ...act, recordedByName: name }))
}

/** The brewery's beers, by code. */
export function beersByCode(tx: Tx, breweryId: string): Promise<(typeof beers.$inferSelect)[]> {
  return tx.select().from(beers).where(eq(beers.breweryId, breweryId)).orderBy(asc(beers.code))
}

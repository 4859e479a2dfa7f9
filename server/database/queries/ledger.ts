import { and, asc, eq, inArray, sql } from 'drizzle-orm'
import type { LedgerLine, MovementKind } from '#shared/cellar/movement'
import { preparedOnce, type Tx } from '../client'
import { acts, beers, brews, ledgerNotes, movements, reversals, users } from '../schema'

export type MovementRow = typeof movements.$inferSelect
export type ActRow = typeof acts.$inferSelect
export type ReversalRow = typeof reversals.$inferSelect

/** A standing line as the database writes it into its one answer: a list, for a name a value would be most of it. */
type LineTuple = [kind: MovementKind, day: number, placeInDay: number, actId: string, position: number, vesselId: string, litres: number, brewId: string | null, toVesselId: string | null, lossLitres: number | null]

// The whole ledger in one value: reading it row by row through the query builder takes several times as long as replaying it.
// The order is the ledger's own: ids of 128 bits sort as their text does.
const STANDING_LINES = `
  select coalesce(json_agg(json_build_array(
    m.kind, m.occurred_on - date '1970-01-01', m.place_in_day, m.act_id, m.position, m.vessel_id, m.litres, m.brew_id, m.to_vessel_id, m.loss_litres
  ) order by m.occurred_on, m.place_in_day, m.act_id, m.position), '[]') as lines
  from movements m left join reversals r on r.brewery_id = m.brewery_id and r.movement_id = m.id
  where m.brewery_id = $1 and r.id is null`

/** Every line of a brewery's ledger that has not been struck out, in ledger order. */
export async function linesInLedgerOrder(tx: Tx, breweryId: string): Promise<LedgerLine[]> {
  const { rows: [row] } = await tx.$client.query<{ lines: LineTuple[] }>({ name: 'standing_lines', text: STANDING_LINES, values: [breweryId] })
  return (row?.lines ?? []).map(lineOf)
}

function lineOf([kind, day, placeInDay, actId, position, vesselId, litres, brewId, toVesselId, lossLitres]: LineTuple): LedgerLine {
  if (brewId !== null) return { kind, day, placeInDay, actId, position, vesselId, litres, brewId }
  if (toVesselId !== null) return { kind, day, placeInDay, actId, position, vesselId, litres, toVesselId, lossLitres: lossLitres ?? 0 }
  return { kind, day, placeInDay, actId, position, vesselId, litres }
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

const brewsWithBeer = preparedOnce(tx => tx.select({
  id: brews.id,
  code: brews.code,
  brewedOn: brews.brewedOn,
  brewedDay: sql<number>`${brews.brewedOn} - date '1970-01-01'`,
  ageBandDays: brews.ageBandDays,
  beerId: brews.beerId,
  beerCode: beers.code,
  beerName: beers.name,
  version: brews.version,
}).from(brews)
  .leftJoin(beers, and(eq(beers.breweryId, brews.breweryId), eq(beers.id, brews.beerId)))
  .where(eq(brews.breweryId, sql.placeholder('breweryId')))
  .orderBy(asc(brews.brewedOn), asc(brews.code))
  .prepare('brews_with_beer'))

/** All brews of a brewery, oldest first, each with its beer. */
export function brewsOldestFirst(tx: Tx, breweryId: string): Promise<BrewRow[]> {
  return brewsWithBeer(tx).execute({ breweryId })
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
    .where(and(eq(reversals.breweryId, breweryId), inArray(reversals.movementId, movementIds)))
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
    .where(and(eq(acts.breweryId, breweryId), inArray(acts.id, ids)))
  return rows.map(({ act, name }) => ({ ...act, recordedByName: name }))
}

/** The brewery's beers, by code. */
export function beersByCode(tx: Tx, breweryId: string): Promise<(typeof beers.$inferSelect)[]> {
  return tx.select().from(beers).where(eq(beers.breweryId, breweryId)).orderBy(asc(beers.code))
}

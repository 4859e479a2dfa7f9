import { and, eq, sql } from 'drizzle-orm'
import type { LineFault } from '#shared/schemas/ledger'
import { anyOf } from '#server/database/anyOf'
import { beersByCode, brewsOldestFirst } from '#server/database/queries/ledger'
import { acts, ledgerNotes, movements, reversals } from '#server/database/schema/index'
import { brewsByCode } from './brewsByCode'
import { createBeer } from './createBeer'
import type { ImportRows } from './importRows'
import { inParts } from './inParts'
import type { Work } from './work'

/**
 * Keep the rows of a ledger file. What is there already with the same content is passed over; what is there with other
 * content, or cannot be struck out, is told by its line, and then nothing is kept.
 */
export async function keepImport(work: Work, rows: ImportRows, { dryRun }: { dryRun: boolean }): Promise<LineFault[]> {
  const faults = [
    ...await movementClashes(work, rows),
    ...await noteClashes(work, rows.notes),
    ...await reversalFaults(work, rows),
  ]
  if (faults.length > 0 || dryRun) return faults

  const { tx, brewery, person, now } = work
  await nameBeers(work, rows)
  const made = await brewsByCode(work, rows.brews)
  const brewIds = new Map([...(await brewsOldestFirst(tx, brewery.id)), ...made.values()].map(brew => [brew.code, brew.id]))
  for (const some of inParts(rows.acts)) {
    await tx.insert(acts).values(some.map(act => ({ ...act, breweryId: brewery.id, recordedAt: now, recordedBy: person.id }))).onConflictDoNothing()
  }
  for (const some of inParts(rows.movements)) {
    const json = JSON.stringify(some.map(({ brewCode, ...row }) => ({ ...row, brewId: brewCode === null ? null : brewIds.get(brewCode) })))
    await tx.execute(sql`
      insert into movements (brewery_id, id, act_id, position, kind, vessel_id, litres, occurred_on, place_in_day, method, note, brew_id, lot, to_vessel_id, loss_litres, reason)
      select ${brewery.id}, r.id, r."actId", r.position, r.kind, r."vesselId", r.litres, r."occurredOn", r."placeInDay", r.method, r.note, r."brewId", r.lot, r."toVesselId", r."lossLitres", r.reason
      from jsonb_to_recordset(${json}::jsonb) as r(id uuid, "actId" uuid, position int, kind movement_kind, "vesselId" uuid, litres numeric, "occurredOn" date, "placeInDay" int, method measuring_method, note text, "brewId" uuid, lot text, "toVesselId" uuid, "lossLitres" numeric, reason loss_reason)
      on conflict (brewery_id, id) do nothing`)
  }
  for (const some of inParts(rows.notes)) {
    await tx.insert(ledgerNotes).values(some.map(({ line: _, ...note }) => ({ ...note, breweryId: brewery.id }))).onConflictDoNothing()
  }
  for (const some of inParts(rows.reversals)) {
    await tx.insert(reversals).values(some.map(({ id, movementId, reason }) => ({ breweryId: brewery.id, id, movementId, requestId: id, reason, reversedAt: now, reversedBy: person.id }))).onConflictDoNothing()
  }
  return []
}

/** A beer that the file names for the first time is made, under its code until somebody gives it a name. */
async function nameBeers(work: Work, { brews }: ImportRows): Promise<void> {
  const known = new Set((await beersByCode(work.tx, work.brewery.id)).map(beer => beer.code))
  const named = new Set(brews.flatMap(brew => brew.beerCode === undefined ? [] : [brew.beerCode]))
  for (const code of named) if (!known.has(code)) await createBeer(work, { code, name: code, family: 'unknown' })
}

/** Everything that a movement says, as one text: two of one id are the same, or one of them is wrong. */
const movementContent = (row: Omit<ImportRows['movements'][number], 'line'>) =>
  JSON.stringify([row.actId, row.position, row.kind, row.vesselId, row.litres, row.occurredOn, row.placeInDay, row.method, row.note, row.brewCode, row.lot, row.toVesselId, row.lossLitres, row.reason])
const noteContent = (row: { actId: string, vesselId: string, notedOn: string, text: string }) => JSON.stringify([row.actId, row.vesselId, row.notedOn, row.text])

const OTHER = { column: 'id', message: 'Something with this id is kept already, and it says something else.' }

/** Lines whose id another line bears already, and lines that would be added to an act that is kept. */
async function movementClashes({ tx, brewery }: Work, { movements: rows, acts: named }: ImportRows): Promise<LineFault[]> {
  const codes = new Map((await brewsOldestFirst(tx, brewery.id)).map(brew => [brew.id, brew.code]))
  const keptActs = new Set((await tx.select({ id: acts.id }).from(acts).where(and(eq(acts.breweryId, brewery.id), anyOf(acts.id, named.map(act => act.id))))).map(act => act.id))
  const places = new Map<string, number>()
  const faults: LineFault[] = []
  for (const some of inParts(rows)) {
    const kept = await tx.select().from(movements).where(and(eq(movements.breweryId, brewery.id), anyOf(movements.id, some.map(row => row.id))))
    const byId = new Map(kept.map(({ brewId, ...row }) => [row.id, { ...row, brewCode: brewId === null ? null : codes.get(brewId) ?? null }]))
    for (const row of some) {
      const other = byId.get(row.id)
      if (other && movementContent(other) !== movementContent(row)) faults.push({ line: row.line, ...OTHER })
      if (!other && keptActs.has(row.actId)) faults.push({ line: row.line, column: 'actId', message: 'This act is kept already: no line can be added to it.' })
      const place = `${row.actId} ${row.position}`
      const first = places.get(place)
      if (first !== undefined) faults.push({ line: row.line, column: 'position', message: `Line ${first} has this place in the act.` })
      places.set(place, row.line)
    }
  }
  return faults
}

/** Notes whose id another note bears already. */
async function noteClashes({ tx, brewery }: Work, rows: ImportRows['notes']): Promise<LineFault[]> {
  if (rows.length === 0) return []
  const kept = new Map((await tx.select().from(ledgerNotes).where(and(eq(ledgerNotes.breweryId, brewery.id), anyOf(ledgerNotes.id, rows.map(row => row.id))))).map(row => [row.id, row]))
  return rows.flatMap((row) => {
    const other = kept.get(row.id)
    return other && noteContent(other) !== noteContent(row) ? [{ line: row.line, ...OTHER }] : []
  })
}

/** Reversals of lines that are neither kept nor in the file, and of lines that are struck out already. */
async function reversalFaults({ tx, brewery }: Work, rows: ImportRows): Promise<LineFault[]> {
  if (rows.reversals.length === 0) return []
  const inFile = new Set(rows.movements.map(row => row.id))
  const wanted = rows.reversals.map(row => row.movementId)
  const kept = new Set((await tx.select({ id: movements.id }).from(movements).where(and(eq(movements.breweryId, brewery.id), anyOf(movements.id, wanted)))).map(row => row.id))
  const struck = new Map((await tx.select().from(reversals).where(and(eq(reversals.breweryId, brewery.id), anyOf(reversals.movementId, wanted)))).map(row => [row.movementId, row.id]))
  const taken = new Map((await tx.select().from(reversals).where(and(eq(reversals.breweryId, brewery.id), anyOf(reversals.id, rows.reversals.map(row => row.id))))).map(row => [row.id, row.movementId]))
  const first = new Map<string, number>()
  return rows.reversals.flatMap((row): LineFault[] => {
    const earlier = first.get(row.movementId)
    first.set(row.movementId, row.line)
    if (!inFile.has(row.movementId) && !kept.has(row.movementId)) return [{ line: row.line, column: 'reverses', message: 'There is no line with this id.' }]
    if (taken.has(row.id) && taken.get(row.id) !== row.movementId) return [{ line: row.line, ...OTHER }]
    const by = struck.get(row.movementId)
    if (earlier !== undefined || (by !== undefined && by !== row.id)) return [{ line: row.line, column: 'reverses', message: 'That line is struck out already.' }]
    return []
  })
}

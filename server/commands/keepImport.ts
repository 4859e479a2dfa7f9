import { and, eq, inArray, sql } from 'drizzle-orm'
import type { LineFault } from '#shared/schemas/ledger'
import { brewsOldestFirst } from '#server/database/queries/ledger'
import { acts, ledgerNotes, movements, reversals } from '#server/database/schema/index'
import { brewsByCode } from './brewsByCode'
import type { ImportRows, Placed } from './importRows'
import { inParts } from './inParts'
import type { Work } from './work'

/**
 * Keep the rows of a ledger file. What is there already with the same content is passed over; what is there with other
 * content, or cannot be struck out, is told by its line, and then nothing is kept.
 */
export async function keepImport(work: Work, rows: ImportRows, { dryRun }: { dryRun: boolean }): Promise<LineFault[]> {
  const faults = [
    ...await clashesOf(work, rows.movements, movements, movementContent),
    ...await clashesOf(work, rows.notes, ledgerNotes, noteContent),
    ...await reversalFaults(work, rows),
  ]
  if (faults.length > 0 || dryRun) return faults

  const { tx, brewery, person, now } = work
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

const movementContent = (row: { vesselId: string, kind: string, litres: number, occurredOn: string, toVesselId: string | null }) =>
  [row.kind, row.vesselId, row.litres, row.occurredOn, row.toVesselId].join('|')
const noteContent = (row: { vesselId: string, notedOn: string, text: string }) => [row.vesselId, row.notedOn, row.text].join('|')

/** Lines whose id something else bears already. */
async function clashesOf<Row extends { id: string }>({ tx, brewery }: Work, rows: readonly Placed<Row>[], table: typeof movements | typeof ledgerNotes, contentOf: (row: Row) => string): Promise<LineFault[]> {
  const faults: LineFault[] = []
  for (const some of inParts(rows)) {
    const kept = await tx.select().from(table).where(and(eq(table.breweryId, brewery.id), inArray(table.id, some.map(row => row.id))))
    const byId = new Map(kept.map(row => [row.id, row]))
    for (const row of some) {
      const other = byId.get(row.id)
      if (other && contentOf({ ...row, ...other }) !== contentOf(row)) faults.push({ line: row.line, column: 'id', message: 'Something with this id is kept already, and it says something else.' })
    }
  }
  return faults
}

/** Reversals of lines that are neither kept nor in the file, and of lines that are struck out already. */
async function reversalFaults({ tx, brewery }: Work, rows: ImportRows): Promise<LineFault[]> {
  if (rows.reversals.length === 0) return []
  const inFile = new Set(rows.movements.map(row => row.id))
  const wanted = rows.reversals.map(row => row.movementId)
  const kept = new Set((await tx.select({ id: movements.id }).from(movements).where(and(eq(movements.breweryId, brewery.id), inArray(movements.id, wanted)))).map(row => row.id))
  const struck = new Map((await tx.select().from(reversals).where(and(eq(reversals.breweryId, brewery.id), inArray(reversals.movementId, wanted)))).map(row => [row.movementId, row.id]))
  const first = new Map<string, number>()
  return rows.reversals.flatMap((row): LineFault[] => {
    const earlier = first.get(row.movementId)
    first.set(row.movementId, row.line)
    if (!inFile.has(row.movementId) && !kept.has(row.movementId)) return [{ line: row.line, column: 'reverses', message: 'There is no line with this id.' }]
    const by = struck.get(row.movementId)
    if (earlier !== undefined || (by !== undefined && by !== row.id)) return [{ line: row.line, column: 'reverses', message: 'That line is struck out already.' }]
    return []
  })
}

import { and, asc, eq } from 'drizzle-orm'
import { brewsOldestFirst } from '#server/database/queries/ledger'
import { vesselsInWalkingOrder } from '#server/database/queries/vessels'
import { acts, ledgerNotes, movements, reversals } from '#server/database/schema/index'
import { writeLedgerFile, type WrittenLine } from '#server/ledgerFile/write'
import type { Work } from './work'

/** The whole ledger as a file that can be read in again: movements in ledger order, then notes, then what was struck out. */
export async function exportLedger({ tx, brewery }: Work): Promise<string> {
  const vessels = new Map((await vesselsInWalkingOrder(tx, brewery.id)).map(vessel => [vessel.id, vessel.name]))
  const brews = new Map((await brewsOldestFirst(tx, brewery.id)).map(brew => [brew.id, brew]))
  const lines = await tx.select({ movement: movements, actNote: acts.note }).from(movements)
    .innerJoin(acts, and(eq(acts.breweryId, movements.breweryId), eq(acts.id, movements.actId)))
    .where(eq(movements.breweryId, brewery.id))
    .orderBy(asc(movements.occurredOn), asc(movements.placeInDay), asc(movements.actId), asc(movements.position))
  const notes = await tx.select().from(ledgerNotes).where(eq(ledgerNotes.breweryId, brewery.id)).orderBy(asc(ledgerNotes.notedOn), asc(ledgerNotes.actId), asc(ledgerNotes.position))
  const struck = await tx.select({ id: reversals.id, movementId: reversals.movementId, reason: reversals.reason, occurredOn: movements.occurredOn, vesselId: movements.vesselId }).from(reversals)
    .innerJoin(movements, and(eq(movements.breweryId, reversals.breweryId), eq(movements.id, reversals.movementId)))
    .where(eq(reversals.breweryId, brewery.id)).orderBy(asc(reversals.reversedAt), asc(reversals.id))
  return writeLedgerFile([
    ...lines.map(({ movement, actNote }): WrittenLine => {
      const brew = movement.brewId === null ? undefined : brews.get(movement.brewId)
      return {
        date: movement.occurredOn, act: movement.kind, vessel: vessels.get(movement.vesselId) ?? '', litres: movement.litres,
        target: brew?.code ?? movement.lot ?? (movement.toVesselId === null ? null : vessels.get(movement.toVesselId) ?? ''),
        brewed: brew?.brewedOn ?? null, lossOnWay: movement.lossLitres || null, reason: movement.reason, method: movement.method,
        ageBand: brew?.ageBandDays ?? null, note: movement.note, beer: brew?.beerCode ?? null,
        id: movement.id, actId: movement.actId, actNote, placeInDay: movement.placeInDay, position: movement.position,
      }
    }),
    ...notes.map((note): WrittenLine => ({ date: note.notedOn, act: 'note', vessel: vessels.get(note.vesselId) ?? '', note: note.text, id: note.id, actId: note.actId })),
    ...struck.map((reversal): WrittenLine => ({ date: reversal.occurredOn, act: 'reversal', vessel: vessels.get(reversal.vesselId) ?? '', note: reversal.reason, id: reversal.id, reverses: reversal.movementId })),
  ])
}

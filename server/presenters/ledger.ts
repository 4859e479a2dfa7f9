import type { ActView, MovementView, ReversalView } from '#shared/schemas/ledger'
import type { ActRow, BrewRow, MovementRow, ReversalWithName } from '#server/database/queries/ledger'

/** The names that a line of the ledger is told with. */
export interface Names {
  vessels: readonly { id: string, name: string }[]
  brews: ReadonlyMap<string, BrewRow>
}

/** A movement as it goes over the wire. */
export function presentMovement(row: MovementRow, { vessels, brews }: Names, reversal: ReversalWithName | undefined): MovementView {
  const { id, actId, position, kind, vesselId, litres, occurredOn, placeInDay, method, note, lot, toVesselId, lossLitres, reason } = row
  const nameOf = (vesselId: string) => vessels.find(vessel => vessel.id === vesselId)?.name ?? ''
  const brew = row.brewId === null ? undefined : brews.get(row.brewId)
  return {
    id, actId, position, kind, vesselId, vesselName: nameOf(vesselId), litres, occurredOn, placeInDay, method, note,
    brew: brew ? { id: brew.id, code: brew.code, brewedOn: brew.brewedOn } : null,
    lot, toVesselId, toVesselName: toVesselId === null ? null : nameOf(toVesselId), lossLitres, reason,
    reversal: reversal ? presentReversal(reversal) : null,
  }
}

/** A reversal as it goes over the wire. */
export function presentReversal({ id, movementId, reason, reversedAt, reversedBy, reversedByName }: ReversalWithName): ReversalView {
  return { id, movementId, reason, reversedAt: reversedAt.toISOString(), reversedById: reversedBy, reversedByName }
}

/** An act with its movements as it goes over the wire. */
export function presentAct({ act, movements }: { act: ActRow & { recordedByName: string }, movements: MovementRow[] }, names: Names, reversals: readonly ReversalWithName[]): ActView {
  const { id, note, recordedAt, recordedBy, recordedByName } = act
  return {
    id, note, recordedAt: recordedAt.toISOString(), recordedById: recordedBy, recordedByName,
    movements: movements.map(row => presentMovement(row, names, reversals.find(reversal => reversal.movementId === row.id))),
  }
}

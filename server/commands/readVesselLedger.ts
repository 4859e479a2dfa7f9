import type { VesselLedger } from '#shared/schemas/ledger'
import { actsByIds, brewsOldestFirst, movementsOfVessel, notesOfVessel, reversalsOf } from '#server/database/queries/ledger'
import { vesselsInWalkingOrder } from '#server/database/queries/vessels'
import { presentMovement } from '#server/presenters/ledger'
import { noSuchVessel } from './readVessel'
import type { Work } from './work'

/** The lines and notes of a vessel, newest first, those struck out among them. */
export async function readVesselLedger({ tx, brewery }: Work, vesselId: string): Promise<VesselLedger> {
  const vessels = await vesselsInWalkingOrder(tx, brewery.id)
  if (!vessels.some(vessel => vessel.id === vesselId)) throw noSuchVessel()
  const rows = await movementsOfVessel(tx, brewery.id, vesselId)
  const brews = new Map((await brewsOldestFirst(tx, brewery.id)).map(brew => [brew.id, brew]))
  const struck = new Map((await reversalsOf(tx, brewery.id, rows.map(row => row.id))).map(reversal => [reversal.movementId, reversal]))
  const acts = await actsByIds(tx, brewery.id, [...new Set(rows.map(row => row.actId))])
  return {
    movements: rows.map(row => presentMovement(row, { vessels, brews }, struck.get(row.id))),
    notes: await notesOfVessel(tx, brewery.id, vesselId),
    acts: acts.map(({ id, note, recordedAt, recordedByName }) => ({ id, note, recordedAt: recordedAt.toISOString(), recordedByName })),
  }
}

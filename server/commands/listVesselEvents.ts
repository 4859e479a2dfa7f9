import type { VesselEventView } from '#shared/schemas/vesselEvent'
import { eventsOfVessel } from '#server/database/queries/vesselEvents'
import { vesselById } from '#server/database/queries/vessels'
import { presentVesselEvent } from '#server/presenters/vesselEvent'
import { noSuchVessel } from './readVessel'
import type { Work } from './work'

/** What befell a vessel besides its beer, newest first. */
export async function listVesselEvents({ tx, brewery }: Work, vesselId: string): Promise<VesselEventView[]> {
  if (!await vesselById(tx, brewery.id, vesselId)) throw noSuchVessel()
  return (await eventsOfVessel(tx, brewery.id, vesselId)).map(presentVesselEvent)
}

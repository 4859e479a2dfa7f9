import type { VesselView } from '#shared/schemas/vessel'
import { vesselsInWalkingOrder } from '#server/database/queries/vessels'
import { presentVessel } from '#server/presenters/vessel'
import type { Work } from './work'

/** All vessels of the brewery in walking order, with what is in each. */
export async function listVessels({ tx, brewery }: Work): Promise<VesselView[]> {
  const rows = await vesselsInWalkingOrder(tx, brewery.id)
  return rows.map(presentVessel)
}

import type { VesselView } from '#shared/schemas/vessel'
import { Fault } from '#shared/types/fault'
import { listVessels, type OnDay } from './listVessels'
import type { Work } from './work'

/** One vessel, with what is in it at the end of a day. */
export async function readVessel(work: Work, id: string, options: OnDay = {}): Promise<VesselView> {
  const vessel = (await listVessels(work, options)).find(one => one.id === id)
  if (!vessel) throw noSuchVessel()
  return vessel
}

/** The fault of an id that no vessel of the brewery bears. */
export function noSuchVessel(): Fault {
  return new Fault('notFound', 'There is no such vessel.')
}

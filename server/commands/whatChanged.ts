import { agePictureOf } from '#shared/cellar/agePicture'
import type { VesselChangeView } from '#shared/schemas/ledger'
import { cellarOn, overBrim, type CellarState } from './cellarState'

/** Each vessel that holds other beer, or another amount, after than before, on a day. */
export function whatChanged(before: CellarState, after: CellarState, on: string): VesselChangeView[] {
  const [then, now] = [cellarOn(before, on), cellarOn(after, on)]
  return after.vessels.flatMap((vessel) => {
    const [was, is] = [then.stack(vessel.id), now.stack(vessel.id)]
    const [wasOld, isOld] = [agePictureOf(was)?.meanDays ?? null, agePictureOf(is)?.meanDays ?? null]
    if (was.litres === is.litres && wasOld === isOld && was.volumeDoubt === is.volumeDoubt) return []
    return [{
      vesselId: vessel.id,
      before: { litres: was.litres, meanAgeDays: wasOld },
      after: { litres: is.litres, meanAgeDays: isOld, volumeDoubt: is.volumeDoubt, overBrim: overBrim(after, vessel, is.litres, on) },
    }]
  })
}

import type { VesselView } from '#shared/schemas/vessel'
import type { VesselRow } from '#server/database/queries/vessels'

/** A vessel as it goes over the wire. Nothing has been filled into any vessel yet, so each is empty and dry. */
export function presentVessel({ id, name, kind, workingLitres, wood, walkingOrder, version }: VesselRow): VesselView {
  return {
    id,
    name,
    kind,
    workingLitres,
    wood,
    walkingOrder,
    litres: 0,
    cohortCount: 0,
    meanAgeDays: null,
    p10AgeDays: null,
    p50AgeDays: null,
    p90AgeDays: null,
    shareOver3Years: null,
    oldestCohort: null,
    nextDraw: null,
    standing: 'dry',
    version,
  }
}

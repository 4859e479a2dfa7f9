import type { VesselEventView } from '#shared/schemas/vesselEvent'
import type { VesselEventRow } from '#server/database/queries/vesselEvents'

/** A vessel event as it goes over the wire. */
export function presentVesselEvent({ id, vesselId, kind, occurredOn, reason, fromLitres, toLitres, recordedAt, recordedByName }: VesselEventRow & { recordedByName: string }): VesselEventView {
  return { id, vesselId, kind, occurredOn, reason, fromLitres, toLitres, recordedAt: recordedAt.toISOString(), recordedByName }
}

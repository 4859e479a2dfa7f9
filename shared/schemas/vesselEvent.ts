import { z } from 'zod'
import { VESSEL_EVENT_KINDS } from '../cellar/vesselEvent'
import { CivilDate, Id, Instant, line } from './fields'
import { REASON_MAX } from './ledger'

/** What the crew may say of a vessel. A verdict is signed elsewhere; a resize comes with a change of the vessel's litres. */
export const REPORTABLE_EVENTS = ['setApart', 'freed', 'emptied', 'soaking', 'soaked', 'away', 'back', 'retired', 'fruitIn', 'fruitOut', 'gravityWatch', 'gravityWatchEnded'] as const

export const VesselEventInput = z.strictObject({
  id: Id,
  kind: z.enum(REPORTABLE_EVENTS),
  occurredOn: CivilDate,
  reason: line(REASON_MAX).optional(),
})
export type VesselEventInput = z.output<typeof VesselEventInput>

export const VesselEventView = z.object({
  id: Id,
  vesselId: Id,
  kind: z.enum(VESSEL_EVENT_KINDS),
  occurredOn: CivilDate,
  reason: z.string().nullable(),
  fromLitres: z.number().nullable(),
  toLitres: z.number().nullable(),
  recordedAt: Instant,
  recordedByName: z.string(),
})
export type VesselEventView = z.output<typeof VesselEventView>

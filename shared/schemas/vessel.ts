import { z } from 'zod'
import { STANDINGS, VESSEL_KINDS, VESSEL_NAME_MAX, WALKING_ORDER_MAX, WORKING_LITRES_MAX } from '../cellar/vessel'
import { CivilDate, Id, Version, line, litres } from './fields'

const editable = {
  name: line(VESSEL_NAME_MAX),
  kind: z.enum(VESSEL_KINDS),
  workingLitres: litres(WORKING_LITRES_MAX),
  wood: z.boolean(),
  walkingOrder: z.int().min(1).max(WALKING_ORDER_MAX),
}

export const VesselCreate = z.strictObject({
  id: Id,
  ...editable,
  wood: editable.wood.optional(),
  walkingOrder: editable.walkingOrder.optional(),
})
export type VesselCreate = z.output<typeof VesselCreate>

export const VesselChange = z.strictObject({ version: Version, ...z.object(editable).partial().shape })
export type VesselChange = z.output<typeof VesselChange>

export const VesselsQuery = z.strictObject({ on: CivilDate.optional(), layers: z.literal('true').optional() })
export const VesselParams = z.strictObject({ id: Id })
export const VesselRemove = z.strictObject({ version: Version })

const ageDays = z.number().nonnegative().nullable()

/** A vessel as the cellar shows it: what it is, and what is in it at the end of the day asked for. Ages by the brew-day clock. */
export const VesselView = z.object({
  id: Id,
  name: z.string(),
  kind: z.enum(VESSEL_KINDS),
  workingLitres: z.number(),
  wood: z.boolean(),
  walkingOrder: z.int(),
  litres: z.number(),
  cohortCount: z.int(),
  meanAgeDays: ageDays,
  p10AgeDays: ageDays,
  p50AgeDays: ageDays,
  p90AgeDays: ageDays,
  shareOver3Years: z.number().min(0).max(1).nullable(),
  oldestCohort: z.object({ brewId: Id, brewCode: z.string(), brewedOn: CivilDate, share: z.number() }).nullable(),
  nextDraw: z.object({ drawId: Id, dueOn: CivilDate, meanAgeDays: ageDays, blocked: z.boolean() }).nullable(),
  standing: z.enum(STANDINGS),
  /** Why it stands so, as it was recorded, and since when. */
  standingReason: z.string().nullable(),
  standingSince: CivilDate.nullable(),
  fruiting: z.boolean(),
  gravityWatch: z.boolean(),
  volumeDoubt: z.boolean(),
  /** Holds more than its working litres. */
  overBrim: z.boolean(),
  beer: z.object({ code: z.string(), name: z.string() }).nullable(),
  /** Oldest first, if asked for. Shares of all that is in it. */
  layers: z.array(z.object({ brewCode: z.string(), brewedOn: CivilDate, beerCode: z.string().nullable(), share: z.number() })).optional(),
  version: Version,
})
export type VesselView = z.output<typeof VesselView>

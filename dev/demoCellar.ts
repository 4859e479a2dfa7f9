import { z } from 'zod'
import { ROLES } from '#shared/abilities'
import { VESSEL_KINDS } from '#shared/cellar/vessel'
import { VESSEL_EVENT_KINDS } from '#shared/cellar/vesselEvent'
import { CivilDate } from '#shared/schemas/fields'

const ClosedDays = z.union([
  z.object({ rule: z.string() }),
  z.object({ fromMonthDay: z.string(), toMonthDay: z.string(), since: CivilDate.nullable().default(null) }),
])

const BreweryFile = z.object({
  brewery: z.object({ name: z.string(), timeZone: z.string(), sendAt: z.string(), closedDays: z.array(ClosedDays).default([]) }),
  people: z.array(z.object({ email: z.string(), name: z.string(), role: z.enum(ROLES), accessUntil: CivilDate.nullable().default(null) })),
  beers: z.array(z.object({ code: z.string(), name: z.string(), family: z.string() })).default([]),
  vessels: z.array(z.object({ name: z.string(), kind: z.enum(VESSEL_KINDS), workingLitres: z.number(), wood: z.boolean(), beer: z.string().nullable().default(null), walkingOrder: z.int() })),
  resizes: z.array(z.object({ vessel: z.string(), on: CivilDate, fromLitres: z.number(), toLitres: z.number() })).default([]),
  vesselEvents: z.array(z.object({ vessel: z.string(), kind: z.enum(VESSEL_EVENT_KINDS), on: CivilDate, reason: z.string() })).default([]),
})
export type BreweryFile = z.output<typeof BreweryFile>

/** What of `cellar.json` the application can take in so far: two breweries, and the day that they are set on. */
export const DemoCellar = z.object({ demoDay: CivilDate, ...BreweryFile.shape, second: BreweryFile.extend({
  ledger: z.array(z.object({ date: CivilDate, act: z.string(), vessel: z.string(), litres: z.number(), target: z.string(), brewed: CivilDate })),
}),
})
export type DemoCellar = z.output<typeof DemoCellar>

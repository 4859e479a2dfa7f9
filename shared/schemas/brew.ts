import { z } from 'zod'
import { CivilDate, Id, Version, line } from './fields'
import { BREW_CODE_MAX } from './ledger'

/** A brew, what of it is still in the cellar today, and where. */
export const BrewView = z.object({
  id: Id,
  code: z.string(),
  brewedOn: CivilDate,
  ageBandDays: z.int().nullable(),
  beerId: Id.nullable(),
  beerCode: z.string().nullable(),
  beerName: z.string().nullable(),
  /** Litres racked in from it, and litres of it in the cellar now. */
  rackedLitres: z.number(),
  litresNow: z.number(),
  vessels: z.array(z.object({ vesselId: Id, vesselName: z.string(), litres: z.number(), share: z.number() })),
  version: Version,
})
export type BrewView = z.output<typeof BrewView>

export const BrewChange = z.strictObject({
  version: Version,
  beerCode: line(BREW_CODE_MAX).nullable().optional(),
  ageBandDays: z.int().min(1).max(3650).nullable().optional(),
})
export type BrewChange = z.output<typeof BrewChange>

export const BeerView = z.object({ id: Id, code: z.string(), name: z.string(), family: z.string() })
export type BeerView = z.output<typeof BeerView>

import { z } from 'zod'
import { CivilDate, Id } from './fields'

export const OnQuery = z.strictObject({ on: CivilDate.optional() })

/** What is in a vessel at the end of a day, oldest first. */
export const StackView = z.object({
  vesselId: Id,
  on: CivilDate,
  litres: z.number(),
  meanAgeDays: z.number().nullable(),
  p10AgeDays: z.int().nullable(),
  p50AgeDays: z.int().nullable(),
  p90AgeDays: z.int().nullable(),
  shareOver3Years: z.number().nullable(),
  volumeDoubt: z.boolean(),
  overBrim: z.boolean(),
  cohorts: z.array(z.object({
    brewId: Id,
    brewCode: z.string(),
    brewedOn: CivilDate,
    ageBandDays: z.int().nullable(),
    beerCode: z.string().nullable(),
    litres: z.number(),
    share: z.number(),
    ageDays: z.int(),
  })),
})
export type StackView = z.output<typeof StackView>

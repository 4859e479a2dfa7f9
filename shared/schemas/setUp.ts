import { z } from 'zod'
import { EmailAddress, Instant, NewPassword, TimeZone, line } from './fields'

export const BREWERY_NAME_MAX = 80
export const PERSON_NAME_MAX = 80

/** The first form of an empty installation: it makes the brewery and its owner. */
export const SetUp = z.strictObject({
  /** As the start printed it; case, spaces and dashes do not matter. */
  code: z.string().trim().min(1).max(40),
  breweryName: line(BREWERY_NAME_MAX),
  timeZone: TimeZone,
  name: line(PERSON_NAME_MAX),
  email: EmailAddress,
  password: NewPassword,
})
export type SetUp = z.output<typeof SetUp>

/** Whether this installation still waits for its set-up, and until when the printed code is good (null: ask for a new one). */
export const SetUpState = z.object({ open: z.boolean(), codeGoodUntil: Instant.nullable() })
export type SetUpState = z.output<typeof SetUpState>

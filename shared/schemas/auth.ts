import { z } from 'zod'
import { ROLES } from '../abilities'
import { CivilDate, EMAIL_MAX, Id, PASSWORD_MAX, TimeZone } from './fields'

/** Whatever was typed is taken here: an address that is none is answered like one that is not known. */
export const SignIn = z.strictObject({
  email: z.string().trim().min(1).max(EMAIL_MAX),
  password: z.string().min(1).max(PASSWORD_MAX),
})
export type SignIn = z.output<typeof SignIn>

export const ChooseBrewery = z.strictObject({ breweryId: Id })

/** Who is signed in, where, and what day it is there. `brewery` and `role` are null while a person of several has not chosen. */
export const Me = z.object({
  user: z.object({ id: Id, name: z.string(), email: z.string() }),
  brewery: z.object({ id: Id, name: z.string(), timeZone: TimeZone, today: CivilDate }).nullable(),
  role: z.enum(ROLES).nullable(),
  breweries: z.array(z.object({ id: Id, name: z.string(), role: z.enum(ROLES) })),
})
export type Me = z.output<typeof Me>

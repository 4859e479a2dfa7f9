import { z } from 'zod'

// Controls break columns, mail headers and logs; PostgreSQL refuses U+0000 altogether. Line breaks are let through where a text may have several lines.
const CONTROL = /[\p{Cc}\u2028\u2029]/u
const CONTROL_BUT_BREAKS = /[^\P{Cc}\n\t]/u

/** One line of text that a person wrote: trimmed, not empty, no control characters, at most `max` signs. */
export function line(max: number) {
  return z.string().trim().min(1).max(max)
    .refine(text => text.isWellFormed() && !CONTROL.test(text), { error: 'There is a sign in this that cannot be kept. Type it anew.' })
}

/** Several lines of text that a person wrote: trimmed, not empty, at most `max` signs. */
export function lines(max: number) {
  return z.string().trim().min(1).max(max)
    .refine(text => text.isWellFormed() && !CONTROL_BUT_BREAKS.test(text), { error: 'There is a sign in this that cannot be kept. Type it anew.' })
}

/** An id made by whoever sends it: any UUID of RFC 9562. */
export const Id = z.uuid().toLowerCase()

/** The version of a row that the sender last saw. */
export const Version = z.int().min(1)

/** A day of the brewery's calendar, `2026-09-14`. */
export const CivilDate = z.iso.date({ error: 'Write a day that exists, as 2026-09-14.' })
  .refine(date => date >= '1900-01-01', { error: 'No brewery here is that old: write a day since 1900.' })

/** An instant, `2026-09-14T06:30:00.000Z`. */
export const Instant = z.iso.datetime()

/** Litres of a vessel or a movement: above nought, three decimals at most. */
export function litres(max: number) {
  return millilitres(z.number().positive({ error: 'Write litres above nought.' }).max(max))
}

/** Litres that may be none at all. */
export function litresOrNone(max: number) {
  return millilitres(z.number().min(0, { error: 'Write litres of nought or more.' }).max(max))
}

// The database keeps thousandths: what is not one of them would come back as another number than was sent.
function millilitres(litres: z.ZodNumber) {
  return litres.refine(value => value === thousandths(value), { error: 'Litres have three decimals at most.' })
}

/** The nearest number of three decimals. */
export function thousandths(value: number): number {
  return Math.round(value * 1000) / 1000
}

const IANA_NAME = /^[A-Za-z][A-Za-z0-9_+-]*(\/[A-Za-z0-9_+-]+){0,2}$/

/** A time zone by its IANA name. */
export const TimeZone = z.string().max(64).refine(isTimeZone, { error: 'Choose a time zone by its name, as Europe/Copenhagen.' })

function isTimeZone(name: string): boolean {
  if (!IANA_NAME.test(name)) return false
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions().timeZone.length > 0
  }
  catch {
    return false
  }
}

export const EMAIL_MAX = 254

/** An e-mail address: plain ASCII, one `@`, no comments or quotes; kept in lower case. */
export const EmailAddress = z.email({ error: 'Write an e-mail address, as name@brewery.example.' }).max(EMAIL_MAX).toLowerCase()

export const PASSWORD_MIN = 10
export const PASSWORD_MAX = 1_000

/** A new password. Whether it is a common one is asked where the list of those is. */
export const NewPassword = z.string()
  .min(PASSWORD_MIN, { error: `Use ${PASSWORD_MIN} signs or more; a few plain words do well.` })
  .max(PASSWORD_MAX, { error: `Use ${PASSWORD_MAX} signs at most.` })

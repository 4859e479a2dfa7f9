import { Temporal } from 'temporal-polyfill'

/**
 * The day that it is in a time zone at an instant.
 *
 * @param instant milliseconds since 1970
 * @param timeZone an IANA name
 * @returns a civil date, `2026-09-14`
 */
export function civilDateIn(timeZone: string, instant: number): string {
  return Temporal.Instant.fromEpochMilliseconds(instant).toZonedDateTimeISO(timeZone).toPlainDate().toString()
}

/** A civil date `days` later (earlier, if below nought). */
export function addDays(date: string, days: number): string {
  return Temporal.PlainDate.from(date).add({ days }).toString()
}

/** Whole days from `from` to `to`; below nought if `to` is the earlier. */
export function daysBetween(from: string, to: string): number {
  return Temporal.PlainDate.from(from).until(to, { largestUnit: 'days' }).days
}

/** The Monday of the week a civil date lies in (ISO 8601). */
export function mondayOf(date: string): string {
  const day = Temporal.PlainDate.from(date)
  return day.subtract({ days: day.dayOfWeek - 1 }).toString()
}

const DAY_MILLIS = 86_400_000

/**
 * A civil date as days since 1970-01-01: the form the engine reckons in. A civil date has no zone, so this is plain
 * arithmetic on the calendar of ISO 8601.
 */
export function epochDay(date: string): number {
  return Date.UTC(Number(date.slice(0, 4)), Number(date.slice(5, 7)) - 1, Number(date.slice(8, 10))) / DAY_MILLIS
}

/** The civil date that is so many days after 1970-01-01. */
export function civilDateOf(day: number): string {
  return new Date(day * DAY_MILLIS).toISOString().slice(0, 10)
}

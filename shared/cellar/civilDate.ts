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

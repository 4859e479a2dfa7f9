const DAY_MS = 86_400_000

const parts = (form: Intl.DateTimeFormatOptions) => new Intl.DateTimeFormat('en-GB', { ...form, timeZone: 'UTC' })
const WEEKDAY = parts({ weekday: 'short' })
const DAY_MONTH_YEAR = parts({ day: 'numeric', month: 'long', year: 'numeric' })
const DAY_MONTH = parts({ day: 'numeric', month: 'long' })

/** `Mon 14 September 2026`. Days are days of a calendar (`2026-09-14`), never instants. */
export function fullDate(day: string): string {
  return `${WEEKDAY.format(noon(day))} ${DAY_MONTH_YEAR.format(noon(day))}`
}

/** `Mon 14 Sep`, for where there is little room. */
export function shortDate(day: string): string {
  const [dayOfMonth, month = ''] = DAY_MONTH.format(noon(day)).split(' ')
  return `${WEEKDAY.format(noon(day))} ${dayOfMonth} ${month.slice(0, 3)}`
}

/** `14 September 2026`. */
export function plainDate(day: string): string {
  return DAY_MONTH_YEAR.format(noon(day))
}

/** `16 Feb 2026`, for tables. */
export function tableDate(day: string): string {
  const [dayOfMonth, month = '', year = ''] = plainDate(day).split(' ')
  return `${dayOfMonth} ${month.slice(0, 3)} ${year}`
}

/** Whole days from one day to another; below nought if the second is the earlier. */
export function daysFrom(from: string, to: string): number {
  return Math.round((noon(to).getTime() - noon(from).getTime()) / DAY_MS)
}

/** The week's number by ISO 8601: the week of a day is the week of its Thursday. */
export function isoWeek(day: string): number {
  const date = noon(day)
  const daysFromMonday = (date.getUTCDay() + 6) % 7
  const thursday = new Date(date.getTime() + (3 - daysFromMonday) * DAY_MS)
  const newYear = Date.UTC(thursday.getUTCFullYear(), 0, 1)
  return 1 + Math.floor((thursday.getTime() - newYear) / (7 * DAY_MS))
}

/** `07:31`, by the clock of a time zone. */
export function clockTime(instant: Date, timeZone: string | undefined): string {
  return new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23', timeZone }).format(instant)
}

function noon(day: string): Date {
  return new Date(`${day}T12:00:00Z`)
}

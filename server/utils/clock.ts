import { settings } from './settings'

/** A clock that can be set to stand somewhere at boot, and runs on from there. */
export interface Clock {
  now(): Date
}

/** @param startsAt where the clock stands now, as an ISO instant; the machine's own time if not given */
export function clockFrom(startsAt: string | undefined): Clock {
  const ahead = startsAt === undefined ? 0 : Date.parse(startsAt) - Date.now()
  return { now: () => new Date(Date.now() + ahead) }
}

let running: Clock | undefined

/** The one clock of the application. */
export function useClock(): Clock {
  running ??= clockFrom(settings().startsAt)
  return running
}

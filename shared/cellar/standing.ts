import type { Standing } from './vessel'
import type { VesselEvent, VesselEventKind } from './vesselEvent'

/** What of a vessel's ledger its standing depends on. Days since 1970-01-01, null if there was none. */
export interface LedgerFacts {
  litres: number
  workingLitres: number
  lastDrawDay: number | null
  /** The last day on which beer came to beer that was there already. */
  lastRefillDay: number | null
}

/** A vessel's standing, and what is going on in it besides. */
export interface StandingPicture {
  standing: Standing
  /** Why, in the words of whoever recorded it. */
  reason: string | null
  /** Since when; null where the ledger alone says so. */
  sinceDay: number | null
  fruiting: boolean
  gravityWatch: boolean
}

/** Above this a vessel takes longer to mix. Common practice, no source. */
const LARGE_LITRES = 1_000
const MIXING_DAYS = { large: 14, small: 5 }

/**
 * How a vessel is on a day: the one plain word, read off its events and its ledger. What ends it for good goes before
 * what bars it, that before what is in it, that before what is planned with it.
 *
 * @param events in the order in which they happened
 */
export function standingOf(events: readonly VesselEvent[], facts: LedgerFacts, onDay: number): StandingPicture {
  const past = events.filter(event => event.day <= onDay)
  const open = (opens: VesselEventKind, ...closes: VesselEventKind[]) => stillOpen(past, opens, closes)
  const also = { fruiting: facts.litres > 0 && open('fruitIn', 'fruitOut') !== null, gravityWatch: facts.litres > 0 && open('gravityWatch', 'gravityWatchEnded') !== null }
  const told = (standing: Standing, event: VesselEvent): StandingPicture => ({ standing, reason: event.reason, sinceDay: event.day, ...also })
  const plain = (standing: Standing, sinceDay: number | null): StandingPicture => ({ standing, reason: null, sinceDay, ...also })

  const retired = open('retired')
  if (retired) return told('retired', retired)
  const away = open('away', 'back')
  if (away) return told('away', away)
  const setApart = open('setApart', 'freed')
  if (setApart) return told('setApart', setApart)
  if (facts.litres === 0) {
    const soaking = open('soaking', 'soaked')
    if (soaking) return told('soaking', soaking)
    const emptied = open('emptied')
    return emptied ? told('dry', emptied) : plain('dry', null)
  }
  const drawn = facts.lastDrawDay
  const verdict = latest([open('called', 'held'), open('held', 'called')])
  if (verdict && (drawn === null || verdict.day > drawn)) return told(verdict.kind === 'called' ? 'called' : 'held', verdict)
  const refilled = facts.lastRefillDay
  const mixingDays = facts.workingLitres > LARGE_LITRES ? MIXING_DAYS.large : MIXING_DAYS.small
  if (refilled !== null && onDay - refilled < mixingDays) return plain('settling', refilled)
  return plain('resting', null)
}

/** The last event of a kind that nothing later has ended. */
function stillOpen(events: readonly VesselEvent[], opens: VesselEventKind, closes: readonly VesselEventKind[]): VesselEvent | null {
  let found: VesselEvent | null = null
  for (const event of events) {
    if (event.kind === opens) found = event
    else if (closes.includes(event.kind)) found = null
  }
  return found
}

function latest(events: readonly (VesselEvent | null)[]): VesselEvent | null {
  return events.reduce((last, event) => event && (!last || event.day >= last.day) ? event : last, null)
}

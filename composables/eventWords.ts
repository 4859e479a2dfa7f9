import type { VesselEventInput } from '#shared/schemas/vesselEvent'
import type { VesselView } from '#shared/schemas/vessel'
import type { VesselEventKind } from '#shared/cellar/vesselEvent'

export type EventKind = VesselEventInput['kind']

/** What befell a vessel, as it is told. */
export const EVENT_WORDS: Record<VesselEventKind, string> = {
  called: 'Called', held: 'Held', setApart: 'Set apart', freed: 'Free again', emptied: 'Emptied', soaking: 'Soaking', soaked: 'Soaked',
  away: 'Away', back: 'Back', retired: 'Retired', fruitIn: 'Fruit in', fruitOut: 'Fruit out', gravityWatch: 'Gravity watched', gravityWatchEnded: 'Gravity watch over', resized: 'Resized',
}

/** What may be recorded of a vessel as it is now, in the order in which it is offered. */
export function eventChoices({ standing, litres, fruiting, gravityWatch }: Pick<VesselView, 'standing' | 'litres' | 'fruiting' | 'gravityWatch'>): { value: EventKind, label: string }[] {
  if (standing === 'retired') return []
  const filled = litres > 0
  const kinds: (EventKind | false)[] = [
    standing === 'setApart' ? 'freed' : 'setApart',
    filled && (fruiting ? 'fruitOut' : 'fruitIn'),
    filled && (gravityWatch ? 'gravityWatchEnded' : 'gravityWatch'),
    !filled && standing !== 'away' && 'emptied',
    !filled && (standing === 'soaking' ? 'soaked' : 'soaking'),
    standing === 'away' ? 'back' : 'away',
    !filled && 'retired',
  ]
  return kinds.filter(kind => kind !== false).map(value => ({ value, label: EVENT_WORDS[value] }))
}

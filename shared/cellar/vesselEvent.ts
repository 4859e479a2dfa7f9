/** What can befall a vessel besides its beer. */
export const VESSEL_EVENT_KINDS = [
  'called', 'held', 'setApart', 'freed', 'emptied', 'soaking', 'soaked', 'away', 'back', 'retired', 'fruitIn', 'fruitOut', 'gravityWatch', 'gravityWatchEnded', 'resized',
] as const
export type VesselEventKind = (typeof VESSEL_EVENT_KINDS)[number]

/** A vessel event as the rules read it. */
export interface VesselEvent {
  kind: VesselEventKind
  /** Days since 1970-01-01. */
  day: number
  reason: string | null
}

/** A change of what a vessel holds. */
export interface Resize {
  day: number
  fromLitres: number
  toLitres: number
}

/** The working litres of a vessel on a day: today's, or what they were before the first resize that came later. */
export function workingLitresOn(day: number, todaysLitres: number, resizes: readonly Resize[]): number {
  const later = resizes.filter(resize => resize.day > day).sort((a, b) => a.day - b.day)
  return later[0]?.fromLitres ?? todaysLitres
}

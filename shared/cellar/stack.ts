import type { Cellar } from './replay'

/** What the engine has to know of a brew. */
export interface BrewDates {
  id: string
  code: string
  /** Days since 1970-01-01. */
  brewedDay: number
}

/** All beer of one brew in a vessel. */
export interface Cohort {
  brew: BrewDates
  litres: number
  /** Of all that is in the vessel, 0 to 1. */
  share: number
  /** Since the brew day. */
  ageDays: number
}

export interface Stack {
  litres: number
  /** Oldest first; brews of one day by code. */
  cohorts: Cohort[]
  volumeDoubt: boolean
}

/**
 * The stack of a vessel: its cohorts, oldest first, by the brew-day clock.
 *
 * @param onDay the day on which the ages are told, in days since 1970-01-01
 * @param brewOf finds a brew by its id; throws for one that is not known
 */
export function stackOf(cellar: Cellar, vesselId: string, onDay: number, brewOf: (id: string) => BrewDates): Stack {
  const contents = cellar.vessels.get(vesselId)
  if (contents === undefined) return { litres: 0, cohorts: [], volumeDoubt: false }
  const byBrew = new Map<string, number>()
  contents.parcels.forEach((parcel, place) => {
    const brewId = cellar.parcelKinds[parcel]?.brewId
    if (brewId !== undefined) byBrew.set(brewId, (byBrew.get(brewId) ?? 0) + (contents.amounts[place] ?? 0) * contents.scale)
  })
  const cohorts = [...byBrew].map(([id, litres]) => {
    const brew = brewOf(id)
    return { brew, litres, share: Math.min(1, litres / contents.litres), ageDays: onDay - brew.brewedDay }
  })
  cohorts.sort((a, b) => a.brew.brewedDay - b.brew.brewedDay || (a.brew.code < b.brew.code ? -1 : 1))
  return { litres: contents.litres, cohorts, volumeDoubt: contents.volumeDoubt }
}
